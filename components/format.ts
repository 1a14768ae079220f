/** One way to write each figure, for every screen: a figure has one value everywhere. */
import { formatQuantity, type Unit } from '@/converters/quantities'
import type { Verdict } from './ui/Figure'

/** Three significant figures, angles and decibels to a tenth; what does not exist says so. */
export function figure(value: number | null | undefined, unit: Unit): string {
  if (value === null || value === undefined) return 'none'
  if (unit === '°') return degrees(value)
  return unit === 'dB' ? decibels(value) : formatQuantity(value, unit)
}

/** Phase and gain to a tenth, as analysers print them. */
export function decibels(value: number): string {
  return `${tenth(value)} dB`
}
export function degrees(value: number): string {
  return `${tenth(value)}°`
}
function tenth(value: number): string {
  const text = value.toFixed(1)
  return (text === '-0.0' ? '0.0' : text).replace('-', '−')
}

export function ratio(value: number, digits = 3): string {
  return formatQuantity(value, '', digits)
}

/** Below this much over the aim a margin is called tight. */
const TIGHT_DEGREES = 5
const TIGHT_DECIBELS = 2
const USUAL_MODULUS_MARGIN = 0.5 // common practice, no source

/** A phase or gain margin against its aim. */
export function verdictOf(margin: number | null, aim: number, unit: '°' | 'dB'): Verdict | undefined {
  if (margin === null) return undefined
  if (margin < aim) return 'short'
  return margin < aim + (unit === '°' ? TIGHT_DEGREES : TIGHT_DECIBELS) ? 'tight' : 'holds'
}

export function modulusVerdict(margin: number): Verdict {
  if (margin < USUAL_MODULUS_MARGIN) return 'short'
  return margin < 1.15 * USUAL_MODULUS_MARGIN ? 'tight' : 'holds'
}

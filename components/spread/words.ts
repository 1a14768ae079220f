/** How the figures of the spread are written. */
import { figure, ratio } from '@/components/format'
import type { Unit } from '@/converters/quantities'
import type { SpreadFigure } from '@/converters/spread/results'

export const FIGURES: readonly { readonly key: SpreadFigure; readonly label: string; readonly unit: Unit }[] = [
  { key: 'crossover', label: 'Crossover', unit: 'Hz' },
  { key: 'phaseMargin', label: 'Phase margin', unit: '°' },
  { key: 'gainMargin', label: 'Gain margin', unit: 'dB' },
  { key: 'modulusMargin', label: 'Modulus margin', unit: '' },
]

export function figureIn(value: number | null | undefined, unit: Unit): string {
  return unit === '' && typeof value === 'number' ? ratio(value) : figure(value, unit)
}

const COUNT = new Intl.NumberFormat('en-GB')
export const count = (value: number): string => COUNT.format(value)

/** A share in per cent, rounded downwards: what is not all of them is never written as 100 %. */
export const shareDown = (share: number): string => percent(Math.floor(share * 1e4 + 1e-6) / 100)
export const shareUp = (share: number): string => percent(Math.ceil(share * 1e4 - 1e-6) / 100)
const percent = (value: number) => `${value >= 100 ? '100' : value.toFixed(2)} %`

export const sentence = (label: string): string => label.charAt(0).toUpperCase() + label.slice(1)

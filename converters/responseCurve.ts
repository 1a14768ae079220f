/** Complex values along a frequency list as they are plotted. */
import { argumentDeg, decibels, type Complex } from './numeric/complex'
import type { ResponseCurve } from './results'

const LOWEST_FREQUENCY = 10 // Hz

/** Gain in dB and phase unwrapped along the list, starting in (−180°, 180°]. */
export function curve(values: readonly Complex[]): ResponseCurve {
  let previous = 0
  return values.map((value, i) => {
    const principal = argumentDeg(value)
    previous = i === 0 ? principal : principal + 360 * Math.round((previous - principal) / 360)
    return { gainDb: decibels(value), phaseDeg: previous }
  })
}

/** `count` frequencies in Hz, logarithmic, from `LOWEST_FREQUENCY` to half the switching frequency. */
export function defaultFrequencies(switchingFrequency: number, count: number): number[] {
  const highest = switchingFrequency / 2
  const lowest = Math.min(LOWEST_FREQUENCY, highest / 1000)
  return Array.from({ length: count }, (_, i) => lowest * (highest / lowest) ** (i / (count - 1)))
}

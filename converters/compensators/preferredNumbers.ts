/**
 * Preferred numbers for resistors and capacitors, IEC 60063:2015. Its series are rounded steps of 10^(1/n), with the
 * exceptions that the standard keeps for historical reasons.
 */
import type { PreferredSeries } from './options'

/** E24 cannot be computed: between 2.7 and 4.7 and at 8.2 the standard departs from the rounded powers. */
const E24 = [10, 11, 12, 13, 15, 16, 18, 20, 22, 24, 27, 30, 33, 36, 39, 43, 47, 51, 56, 62, 68, 75, 82, 91].map(
  (tenths) => tenths * 10,
)
/** Rounded to three figures, except 920, which the power would make 919. */
const E192 = Array.from({ length: 192 }, (_, i) => (i === 185 ? 920 : Math.round(100 * 10 ** (i / 192))))

const every = (values: readonly number[], step: number) => values.filter((_, i) => i % step === 0)

/** One decade of each series, in hundredths (100 to 999), so that every decade is exact. */
const DECADES: Readonly<Record<PreferredSeries, readonly number[]>> = {
  E3: every(E24, 8),
  E6: every(E24, 4),
  E12: every(E24, 2),
  E24,
  E48: every(E192, 4),
  E96: every(E192, 2),
  E192,
}

/**
 * All values of a series between two limits, both included, ascending. Each is the double nearest to its decimal
 * digits (4.7e-6, not 4.7·10⁻⁶ rounded twice).
 * @param smallest - above zero
 */
export function preferredValues(series: PreferredSeries, smallest: number, largest: number): number[] {
  const values: number[] = []
  for (let exponent = Math.floor(Math.log10(smallest)); exponent <= Math.ceil(Math.log10(largest)); exponent++) {
    for (const hundredths of DECADES[series]) {
      const value = Number(`${hundredths}e${exponent - 2}`)
      if (value >= smallest && value <= largest) values.push(value)
    }
  }
  return values
}

/** A list of one's own, such as what is in stock: ascending, without duplicates, within the limits. */
export function ownValues(list: readonly number[], smallest: number, largest: number): number[] {
  return [...new Set(list)].filter((value) => value >= smallest && value <= largest).sort((a, b) => a - b)
}

/**
 * The values nearest to `target` by ratio, the nearest first.
 * @param values - ascending, above zero
 * @returns as many as asked for, or all there are
 */
export function nearestValues(values: readonly number[], target: number, count: number): number[] {
  let above = firstNotBelow(values, target)
  let below = above - 1
  const nearest: number[] = []
  while (nearest.length < count && (below >= 0 || above < values.length)) {
    const takesAbove = below < 0 || (above < values.length && values[above]! / target <= target / values[below]!)
    nearest.push(takesAbove ? values[above++]! : values[below--]!)
  }
  return nearest
}

/** Index of the first value that is not below `target`; binary search. */
function firstNotBelow(values: readonly number[], target: number): number {
  let low = 0
  let high = values.length
  while (low < high) {
    const middle = (low + high) >> 1
    if (values[middle]! < target) low = middle + 1
    else high = middle
  }
  return low
}

/** A column of figures as people read it: moments, quantiles, histogram. */
import type { Distribution, Histogram } from './results'

const MOST_BINS = 40

/**
 * @param column - NaN where a sample has no such figure.
 * @returns null if none has.
 */
export function distributionOf(column: Float64Array): Distribution | null {
  const sorted = column.filter((value) => !Number.isNaN(value)).sort()
  const count = sorted.length
  if (count === 0) return null
  const mean = sorted.reduce((sum, value) => sum + value, 0) / count
  const variance = sorted.reduce((sum, value) => sum + (value - mean) ** 2, 0) / Math.max(1, count - 1)
  return {
    count,
    absent: column.length - count,
    mean,
    standardDeviation: Math.sqrt(variance),
    minimum: sorted[0]!,
    maximum: sorted[count - 1]!,
    quantiles: {
      p01: quantileOfSorted(sorted, 0.01),
      p05: quantileOfSorted(sorted, 0.05),
      p50: quantileOfSorted(sorted, 0.5),
      p95: quantileOfSorted(sorted, 0.95),
      p99: quantileOfSorted(sorted, 0.99),
    },
    histogram: histogramOf(sorted),
  }
}

/** Linear interpolation between order statistics: type 7 of Hyndman and Fan, The American Statistician 1996. */
export function quantileOfSorted(sorted: ArrayLike<number>, p: number): number {
  const at = p * (sorted.length - 1)
  const below = Math.floor(at)
  const above = Math.min(below + 1, sorted.length - 1)
  return sorted[below]! + (at - below) * (sorted[above]! - sorted[below]!)
}

/** Bins of a width of 1, 2 or 5 times a power of ten, at most 40 of them or so. */
function histogramOf(sorted: Float64Array): Histogram {
  const lowest = sorted[0]!
  const highest = sorted[sorted.length - 1]!
  const width = binWidth(lowest, highest)
  const first = Math.floor(lowest / width)
  const bins = Math.max(1, Math.floor(highest / width) - first + 1)
  const counts = new Array<number>(bins).fill(0)
  for (const value of sorted) counts[Math.min(bins - 1, Math.max(0, Math.floor(value / width) - first))]!++
  return { edges: Array.from({ length: bins + 1 }, (_, i) => (first + i) * width), counts }
}

function binWidth(lowest: number, highest: number): number {
  const span = highest - lowest
  // All alike up to round-off: one bin about them.
  if (!(span > 1e-9 * Math.max(Math.abs(lowest), Math.abs(highest)))) return Math.abs(highest) || 1
  const decade = 10 ** Math.floor(Math.log10(span / MOST_BINS))
  return [1, 2, 5, 10].map((step) => step * decade).find((width) => span / width <= MOST_BINS)!
}

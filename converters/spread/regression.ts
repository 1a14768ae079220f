/**
 * Standardised regression coefficients: of y = β₀ + Σ βⱼ·xⱼ fitted by least squares, βⱼ·σ(xⱼ)/σ(y).
 * Source: Saltelli and others, Global Sensitivity Analysis: The Primer, 2008, section 1.2.5.
 *
 * Only sums are kept, so that a hundred thousand samples take no more room than ten and workers can add theirs up.
 */
import { solveReal } from '../numeric/linearSystem'

export interface RegressionSums {
  readonly variables: number
  count: number
  /** Of (1, x₁ … x_d, y) with itself, row-major; only j ≥ i is filled. */
  readonly products: Float64Array
}

export function emptySums(variables: number): RegressionSums {
  return { variables, count: 0, products: new Float64Array((variables + 2) ** 2) }
}

/** (1, x₁ … x_d, y) to be filled in: x about the middle of its range, both of order one, so that squares keep their digits. */
export function regressionRow(variables: number): Float64Array {
  const row = new Float64Array(variables + 2)
  row[0] = 1
  return row
}

export function addToSums(sums: RegressionSums, row: Float64Array): void {
  const { products } = sums
  const size = row.length
  sums.count++
  for (let i = 0; i < size; i++) {
    const left = row[i]!
    for (let j = i; j < size; j++) products[i * size + j]! += left * row[j]!
  }
}

export function mergeSums(all: readonly RegressionSums[]): RegressionSums {
  const merged = emptySums(all[0]!.variables)
  for (const { count, products } of all) {
    merged.count += count
    products.forEach((value, i) => (merged.products[i]! += value))
  }
  return merged
}

export interface StandardisedFit {
  readonly coefficients: readonly number[]
  readonly determination: number // R²
}

/** Null where there are too few samples, or the figure does not vary. */
export function standardisedFit({ variables: d, count, products }: RegressionSums): StandardisedFit | null {
  if (count < d + 2) return null
  const size = d + 2
  const mean = (i: number) => products[i]! / count
  const covariance = (i: number, j: number) =>
    products[Math.min(i, j) * size + Math.max(i, j)]! / count - mean(i) * mean(j)
  const variance = covariance(d + 1, d + 1)
  if (!(variance > 1e-18)) return null
  const deviations = Array.from({ length: d }, (_, i) => Math.sqrt(Math.max(0, covariance(i + 1, i + 1))))
  const spread = Math.sqrt(variance)
  // Correlations: a coefficient over standardised variables is the standardised coefficient itself.
  const matrix = new Float64Array(d * d)
  const right = new Float64Array(d)
  for (let i = 0; i < d; i++) {
    for (let j = 0; j < d; j++) matrix[i * d + j] = covariance(i + 1, j + 1) / (deviations[i]! * deviations[j]!)
    right[i] = covariance(i + 1, d + 1) / (deviations[i]! * spread)
  }
  const correlations = Float64Array.from(right)
  if (!solveReal(matrix, d, right, 1)) return null
  return {
    coefficients: Array.from(right),
    determination: Math.min(
      1,
      right.reduce((sum, value, i) => sum + value * correlations[i]!, 0),
    ),
  }
}

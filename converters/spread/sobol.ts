/**
 * First-order and total-effect Sobol' indices by Saltelli's sampling: two independent sets A and B, and for each variable
 * the set A with that one column taken from B.
 *   S_i = mean(f_B·(f_ABi − f_A))/V,   S_Ti = mean((f_A − f_ABi)²)/2V
 * Sources: Sobol', Mathematical Modelling and Computational Experiment 1993; Saltelli, Annoni, Azzini, Campolongo, Ratto
 * and Tarantola, "Variance based sensitivity analysis of model output. Design and estimator for the total sensitivity
 * index", Computer Physics Communications 2010 (both estimators, table 2, the second after Jansen 1999).
 */
import { latinHypercube } from './random'

export interface SobolSums {
  readonly variables: number
  count: number
  /** Of f over A and B, and of its square. */
  sum: number
  squares: number
  readonly first: Float64Array // Σ f_B·(f_ABi − f_A)
  readonly total: Float64Array // Σ (f_A − f_ABi)²
}

export function emptySobol(variables: number): SobolSums {
  return {
    variables,
    count: 0,
    sum: 0,
    squares: 0,
    first: new Float64Array(variables),
    total: new Float64Array(variables),
  }
}

/** The coordinates of one base sample: A, B, then A with each column of B. */
export function saltelliRows(
  count: number,
  variables: number,
  seed: number,
): (index: number) => readonly [Float64Array, Float64Array, ...Float64Array[]] {
  const cube = latinHypercube(count, 2 * variables, seed)
  return (index) => {
    const both = new Float64Array(2 * variables)
    cube.point(index, both)
    const a = both.slice(0, variables)
    const b = both.slice(variables)
    const mixed = Array.from({ length: variables }, (_, i) => {
      const row = Float64Array.from(a)
      row[i] = b[i]!
      return row
    })
    return [a, b, ...mixed]
  }
}

/** @param values - f over one base sample, in the order of `saltelliRows`; near zero in the mean, for accuracy. */
export function addToSobol(sums: SobolSums, values: readonly number[]): void {
  const a = values[0]!
  const b = values[1]!
  sums.count++
  sums.sum += a + b
  sums.squares += a * a + b * b
  for (let i = 0; i < sums.variables; i++) {
    const mixed = values[i + 2]!
    sums.first[i]! += b * (mixed - a)
    sums.total[i]! += (a - mixed) ** 2
  }
}

export function mergeSobol(all: readonly SobolSums[]): SobolSums {
  const merged = emptySobol(all[0]!.variables)
  for (const part of all) {
    merged.count += part.count
    merged.sum += part.sum
    merged.squares += part.squares
    part.first.forEach((value, i) => (merged.first[i]! += value))
    part.total.forEach((value, i) => (merged.total[i]! += value))
  }
  return merged
}

export interface SobolIndices {
  readonly firstOrder: readonly number[]
  readonly total: readonly number[]
}

/** Null where there are too few samples, or the figure does not vary. */
export function sobolIndices({ count, sum, squares, first, total }: SobolSums): SobolIndices | null {
  if (count < 2) return null
  const mean = sum / (2 * count)
  const variance = squares / (2 * count) - mean * mean
  if (!(variance > 1e-18)) return null
  return {
    firstOrder: Array.from(first, (value) => value / count / variance),
    total: Array.from(total, (value) => value / (2 * count) / variance),
  }
}

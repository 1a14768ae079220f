/**
 * Exact steps of one linear circuit: e^{A·h} and its integral for a set of halving step widths, so that any instant is
 * reached by a few matrix–vector products and a switching instant is bracketed by halving.
 */
import type { Interval } from '../circuit'
import { exponential } from '../numeric/exponential'

/** Halvings below the coarse step; the finest is a hundred-millionth of the period. */
export const LEVELS = 21

export interface Stepper {
  /** Writes the state a step of level k later to `to`; level 0 is the coarse step. */
  readonly step: (level: number, from: Float64Array, inputs: Float64Array, to: Float64Array) => void
  /** ẋ. */
  readonly slope: (from: Float64Array, inputs: Float64Array, to: Float64Array) => void
}

/** @param held - a state that stands still, such as that of an amplifier at its limit. */
export function createStepper(interval: Interval, coarse: number, held: number | null): Stepper {
  const n = interval.A.length
  const m = interval.B[0]!.length
  const size = n + m
  const joint = new Float64Array(size * size)
  for (let i = 0; i < n; i++) {
    if (i === held) continue
    for (let j = 0; j < n; j++) joint[i * size + j] = interval.A[i]![j]!
    for (let j = 0; j < m; j++) joint[i * size + n + j] = interval.B[i]![j]!
  }
  const levels: Float64Array[] = []
  const rows = (matrix: Float64Array) => matrix.slice(0, n * size)
  const levelOf = (k: number) => (levels[k] ??= rows(exponential(joint, size, coarse / 2 ** k)))
  const apply = (matrix: Float64Array, from: Float64Array, inputs: Float64Array, to: Float64Array) => {
    for (let i = 0; i < n; i++) {
      const at = i * size
      let sum = 0
      for (let j = 0; j < n; j++) sum += matrix[at + j]! * from[j]!
      for (let j = 0; j < m; j++) sum += matrix[at + n + j]! * inputs[j]!
      to[i] = sum
    }
  }
  const generator = rows(joint)
  return {
    step: (level, from, inputs, to) => apply(levelOf(level), from, inputs, to),
    slope: (from, inputs, to) => apply(generator, from, inputs, to),
  }
}

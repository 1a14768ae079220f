/** The exact flow of one interval with constant inputs. */
import { MEASURES, type Interval } from '../circuit'
import { exponential } from '../numeric/exponential'

/**
 * x(τ) = E·x(0) + g, and ∫₀^τ v_out dt = p·x(0) + q. All four come from one exponential of the system extended by a
 * constant one and by the integral.
 * Source: Van Loan, "Computing integrals involving the matrix exponential", IEEE Trans. Automatic Control 1978.
 */
export interface Flow {
  readonly E: Float64Array // n × n
  readonly g: Float64Array // n
  readonly p: Float64Array // n
  readonly q: number
}

export function flowOf(interval: Interval, inputs: readonly number[], duration: number): Flow {
  const n = interval.A.length
  const size = n + 2
  const extended = new Float64Array(size * size)
  const output = interval.C[MEASURES.outputVoltage]!
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) extended[i * size + j] = interval.A[i]![j]!
    extended[i * size + n] = dot(interval.B[i]!, inputs)
    extended[(n + 1) * size + i] = output[i]!
  }
  extended[(n + 1) * size + n] = dot(interval.D[MEASURES.outputVoltage]!, inputs)
  const whole = exponential(extended, size, duration)
  const E = new Float64Array(n * n)
  const g = new Float64Array(n)
  for (let i = 0; i < n; i++) {
    E.set(whole.subarray(i * size, i * size + n), i * n)
    g[i] = whole[i * size + n]!
  }
  const last = (n + 1) * size
  return { E, g, p: whole.slice(last, last + n), q: whole[last + n]! }
}

/** E·x + g. */
export function advance(flow: Flow, x: Float64Array): Float64Array {
  const n = x.length
  const next = Float64Array.from(flow.g)
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) next[i]! += flow.E[i * n + j]! * x[j]!
  }
  return next
}

/** ∫ v_out dt over the interval that starts at x. */
export function outputIntegral(flow: Flow, x: Float64Array): number {
  return dot(flow.p, x) + flow.q
}

/** ẋ = A·x + B·u. */
export function derivative(interval: Interval, x: ArrayLike<number>, inputs: readonly number[]): Float64Array {
  return Float64Array.from(interval.A, (row, i) => dot(row, x) + dot(interval.B[i]!, inputs))
}

/** Measure m at state x. */
export function read(interval: Interval, measure: number, x: ArrayLike<number>, inputs: readonly number[]): number {
  return dot(interval.C[measure]!, x) + dot(interval.D[measure]!, inputs)
}

export function dot(a: ArrayLike<number>, b: ArrayLike<number>): number {
  let sum = 0
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!
  return sum
}

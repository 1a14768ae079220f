/**
 * Rest point of the averaged equations of discontinuous conduction (`averaged/discontinuous.ts`, with its sources),
 * together with the duty that gives the wanted output: Newton's method with exact derivatives.
 *
 * With x₀ the state at zero current and m₁ its rising slope, the current's mean while it flows is p = m₁·d·T/2 and it
 * flows for the share i/p of the period; x_c = x₀ with p for the current.
 *   f = d·g₁(x_c) + (i/p − d)·g₂(x_c) + (1 − i/p)·g₃(x₀) = 0, and the mean output alike = V
 */
import { MEASURES, type Circuit, type Interval } from '../circuit'
import { solveReal } from '../numeric/linearSystem'
import { dot } from '../switched/flow'

const MOST_STEPS = 40
/** Relative step below which it has settled. */
const SETTLED = 1e-10

export interface DiscontinuousRest {
  readonly dutyCycle: number
  readonly state: Float64Array
}

/**
 * @param start - a state near the rest point, such as the mean one of continuous conduction.
 * @returns null where it does not settle, or conduction does not stop after all.
 */
export function discontinuousRest(circuit: Circuit, start: ArrayLike<number>, duty: number): DiscontinuousRest | null {
  const n = start.length
  const size = n + 1
  const matrix = new Float64Array(size * size)
  const change = new Float64Array(size)
  const state = Float64Array.from(start)
  let d = duty
  for (let step = 0; step < MOST_STEPS; step++) {
    const share = linearise(circuit, state, d, matrix, change)
    if (!solveReal(matrix, size, change, 1)) return null
    const largest = Math.max(
      Math.abs(change[circuit.stoppingState]! / state[circuit.stoppingState]!),
      Math.abs(change[n]! / d),
    )
    if (!Number.isFinite(largest)) return null
    const damping = Math.min(1, 0.5 / largest)
    for (let i = 0; i < n; i++) state[i]! -= damping * change[i]!
    d -= damping * change[n]!
    if (largest > SETTLED) continue
    return share < 1 && d > 0 && d <= circuit.design.dutyLimit ? { dutyCycle: d, state } : null
  }
  return null
}

/** Fills the residuals and their derivatives over the states and the duty. @returns the share in which current flows. */
function linearise(
  { on, off, idle, inputs, period, stoppingState: s, design }: Circuit,
  state: Float64Array,
  duty: number,
  matrix: Float64Array,
  residual: Float64Array,
): number {
  const n = state.length
  const size = n + 1
  const current = state[s]!
  const stopped = Float64Array.from(state)
  stopped[s] = 0
  const rising = on.A[s]!
  const halfPeak = ((dot(rising, stopped) + dot(on.B[s]!, inputs)) * duty * period) / 2
  const flowing = Float64Array.from(stopped)
  flowing[s] = halfPeak
  const share = current / halfPeak
  for (let i = 0; i < size; i++) {
    const first = rowOf(on, i, n)
    const second = rowOf(off, i, n)
    const third = rowOf(idle, i, n)
    const g1 = dot(first.states, flowing) + dot(first.inputs, inputs)
    const g2 = dot(second.states, flowing) + dot(second.inputs, inputs)
    const g3 = dot(third.states, stopped) + dot(third.inputs, inputs)
    residual[i] = duty * g1 + (share - duty) * g2 + (1 - share) * g3
    /** Of the residual over the half peak, which moves both the current and how long it flows. */
    const overHalfPeak = duty * first.states[s]! + (share - duty) * second.states[s]! - (share / halfPeak) * (g2 - g3)
    for (let j = 0; j < n; j++) {
      matrix[i * size + j] =
        j === s
          ? (g2 - g3) / halfPeak
          : duty * first.states[j]! +
            (share - duty) * second.states[j]! +
            (1 - share) * third.states[j]! +
            (overHalfPeak * rising[j]! * duty * period) / 2
    }
    matrix[i * size + n] = g1 - g2 + (overHalfPeak * halfPeak) / duty
  }
  residual[n]! -= design.output.voltage
  return share
}

/** The rate of state i, or for i = n the output voltage, over states and inputs. */
function rowOf({ A, B, C, D }: Interval, i: number, n: number) {
  return i < n
    ? { states: A[i]!, inputs: B[i]! }
    : { states: C[MEASURES.outputVoltage]!, inputs: D[MEASURES.outputVoltage]! }
}

/** Closed-loop answer of the output to a step of load or line, from the averaged model. */
import { column } from '../averaged/linearModel'
import { complex, divide, modulus, multiply, subtract, type Complex } from '../numeric/complex'
import { eigenvalues, invariantZeros } from '../numeric/eigen'
import { exponential } from '../numeric/exponential'
import { flatten } from '../numeric/linearSystem'
import { dot } from '../switched/flow'
import type { Mode, StepResponse } from '../results'
import type { ClosedLoopSystem } from './closedLoop'

const POINTS = 480

/**
 * @param input - 0 for the line, 1 for the load.
 * @param size - V or A.
 * @param shortest - s; the window is at least this long, so that a fast loop does not end between two periods.
 */
export function stepResponse(system: ClosedLoopSystem, input: 0 | 1, size: number, shortest: number): StepResponse {
  const poles = eigenvalues(system.A)
  const modes = modesOf(system, poles, input, size)
  const largest = modes[0]?.amplitude ?? 0
  const slowest = modes
    .filter((mode) => mode.amplitude > 0.05 * largest)
    .reduce((most, mode) => Math.max(most, mode.timeConstant), 0)
  const window = Math.max(shortest, 5 * slowest)
  const time = Array.from({ length: POINTS + 1 }, (_, i) => (window * i) / POINTS)
  const outputDeviation = simulate(system, input, size, window / POINTS)
  let peak = 0
  outputDeviation.forEach((value, i) => {
    if (Math.abs(value) > Math.abs(outputDeviation[peak]!)) peak = i
  })
  const peakDeviation = outputDeviation[peak]!
  const settled = outputDeviation.findLastIndex((value) => Math.abs(value) > Math.abs(peakDeviation) / 10)
  return {
    size,
    time,
    outputDeviation,
    peakDeviation,
    peakTime: time[peak]!,
    recoveryTime: settled < POINTS ? time[settled + 1]! : null,
    modes,
  }
}

/** Exact at the sample instants: one exponential of the system extended by its constant input. */
function simulate(system: ClosedLoopSystem, input: 0 | 1, size: number, step: number): number[] {
  const n = system.A.length
  const width = n + 1
  const drive = column(system.B, input).map((b) => b * size)
  const extended = flatten([...system.A.map((row, i) => [...row, drive[i]!]), new Array<number>(width).fill(0)])
  const advance = exponential(extended, width, step)
  let x = new Float64Array(width)
  x[n] = 1
  const output: number[] = []
  for (let k = 0; k <= POINTS; k++) {
    output.push(dot(system.C, x) + system.D[input]! * size)
    const next = new Float64Array(width)
    for (let i = 0; i < width; i++) next[i] = dot(advance.subarray(i * width, (i + 1) * width), x)
    x = next
  }
  return output
}

/**
 * Partial fractions of the step response: the share of pole pᵢ is size·K·∏(pᵢ − z)/(pᵢ·∏(pᵢ − p)), a conjugate pair
 * counted once with both halves.
 */
function modesOf(system: ClosedLoopSystem, poles: readonly Complex[], input: 0 | 1, size: number): Mode[] {
  const zeros = invariantZeros(system.A, column(system.B, input), system.C, system.D[input]!)
  const gain = leadingGain(system, poles, zeros, input)
  return poles
    .filter((pole) => pole.im >= 0 && modulus(pole) > 0)
    .map((pole) => {
      let share = complex(gain * size)
      for (const zero of zeros) share = multiply(share, subtract(pole, zero))
      for (const other of poles) share = divide(share, other === pole ? pole : subtract(pole, other))
      return {
        timeConstant: 1 / Math.abs(pole.re),
        ringingFrequency: pole.im / (2 * Math.PI),
        amplitude: modulus(share) * (pole.im > 0 ? 2 : 1),
      }
    })
    .filter((mode) => Number.isFinite(mode.amplitude) && Number.isFinite(mode.timeConstant))
    .sort((a, b) => b.amplitude - a.amplitude)
}

/** K in K·∏(s − z)/∏(s − p): the first non-zero of D, C·B, C·A·B, … */
function leadingGain(
  { A, B, C, D }: ClosedLoopSystem,
  poles: readonly Complex[],
  zeros: readonly Complex[],
  input: 0 | 1,
): number {
  if (poles.length === zeros.length) return D[input]!
  let vector = column(B, input)
  for (let k = poles.length - zeros.length; k > 1; k--) vector = A.map((row) => dot(row, vector))
  return dot(C, vector)
}

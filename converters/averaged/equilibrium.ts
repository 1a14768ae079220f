/** Averaged network and its rest point in continuous conduction. */
import { MEASURES, type Circuit, type Interval } from '../circuit'
import { flatten, solveReal } from '../numeric/linearSystem'
import { dot } from '../switched/flow'

/**
 * State-space averaging of a converter that alternates between two networks.
 *   A = D·A₁ + (1 − D)·A₂, and B, C, D alike
 * Source: Middlebrook and Ćuk, "A general unified approach to modelling switching-converter power stages", PESC 1976.
 * @param dutyCycle - Fraction of the period spent in `on`; 0 < D < 1.
 */
export function averageIntervals(on: Interval, off: Interval, dutyCycle: number): Interval {
  const blend = (first: number[][], second: number[][]) =>
    first.map((row, i) => row.map((value, j) => dutyCycle * value + (1 - dutyCycle) * second[i]![j]!))
  return { A: blend(on.A, off.A), B: blend(on.B, off.B), C: blend(on.C, off.C), D: blend(on.D, off.D) }
}

/** x at which A·x + B·u = 0; null if there is no unique one. */
export function restPoint(network: Interval, inputs: readonly number[]): Float64Array | null {
  const n = network.A.length
  const x = Float64Array.from(network.B, (row) => -dot(row, inputs))
  return solveReal(flatten(network.A), n, x, 1) ? x : null
}

/** Mean output voltage that the averaged circuit settles at. */
export function averagedOutput(circuit: Circuit, dutyCycle: number): number {
  const network = averageIntervals(circuit.on, circuit.off, dutyCycle)
  const x = restPoint(network, circuit.inputs)
  if (!x) return Number.NaN
  return dot(network.C[MEASURES.outputVoltage]!, x) + dot(network.D[MEASURES.outputVoltage]!, circuit.inputs)
}

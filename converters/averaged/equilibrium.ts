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
  const { A, B, C, D } = on
  return {
    A: blend(A, off.A, dutyCycle),
    B: blend(B, off.B, dutyCycle),
    C: blend(C, off.C, dutyCycle),
    D: blend(D, off.D, dutyCycle),
  }
}

/** D·first + (1 − D)·second. In plain loops: statistical runs come here for every sample. */
function blend(first: readonly number[][], second: readonly number[][], dutyCycle: number): number[][] {
  const blended: number[][] = []
  for (let i = 0; i < first.length; i++) {
    const row = first[i]!.slice()
    const other = second[i]!
    for (let j = 0; j < row.length; j++) row[j] = dutyCycle * row[j]! + (1 - dutyCycle) * other[j]!
    blended.push(row)
  }
  return blended
}

/** x at which A·x + B·u = 0; null if there is no unique one. */
export function restPoint(network: Interval, inputs: readonly number[]): Float64Array | null {
  const n = network.A.length
  const x = new Float64Array(n)
  for (let i = 0; i < n; i++) x[i] = -dot(network.B[i]!, inputs)
  return solveReal(flatten(network.A), n, x, 1) ? x : null
}

/** Mean output voltage that the averaged circuit settles at. */
export function averagedOutput(circuit: Circuit, dutyCycle: number): number {
  const network = averageIntervals(circuit.on, circuit.off, dutyCycle)
  const x = restPoint(network, circuit.inputs)
  if (!x) return Number.NaN
  return dot(network.C[MEASURES.outputVoltage]!, x) + dot(network.D[MEASURES.outputVoltage]!, circuit.inputs)
}

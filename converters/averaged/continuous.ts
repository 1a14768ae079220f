/**
 * State-space averaging in continuous conduction, voltage mode.
 *   x̂′ = A·x̂ + B·û + E·d̂,  E = (A₁ − A₂)·X + (B₁ − B₂)·U,  d̂ = v̂_c/V_ramp
 * Holds with ripple small beside the mean and for signals well below half the switching frequency.
 * Source: Middlebrook and Ćuk, "A general unified approach to modelling switching-converter power stages", PESC 1976.
 */
import { MEASURES, type Circuit, type Interval } from '../circuit'
import { DesignError } from '../errors'
import { INPUTS } from '../network'
import { dot } from '../switched/flow'
import { averageIntervals, restPoint } from './equilibrium'
import type { LinearModel } from './linearModel'

/** The averaged network at its rest point, and how duty moves it. */
export interface AveragedStage {
  readonly network: Interval
  readonly rest: Float64Array
  /** E: per second and unit of duty. */
  readonly dutyToState: number[]
  /** V per unit of duty, directly: the output's step at the switching instants. */
  readonly dutyToOutput: number
}

/** @throws DesignError 'singular-network' if the averaged circuit has no rest point. */
export function averageStage(circuit: Circuit, dutyCycle: number): AveragedStage {
  const { on, off, inputs } = circuit
  const network = averageIntervals(on, off, dutyCycle)
  const rest = restPoint(network, inputs)
  if (!rest) {
    throw new DesignError(
      'singular-network',
      'The averaged circuit has no rest point: a current or voltage is undetermined.',
      [],
    )
  }
  const change = (first: number[][], second: number[][], from: ArrayLike<number>, i: number) =>
    dot(first[i]!, from) - dot(second[i]!, from)
  const row = MEASURES.outputVoltage
  return {
    network,
    rest,
    dutyToState: on.A.map((_, i) => change(on.A, off.A, rest, i) + change(on.B, off.B, inputs, i)),
    dutyToOutput: change(on.C, off.C, rest, row) + change(on.D, off.D, inputs, row),
  }
}

/** Columns of the network's inputs that a small-signal model keeps: line and load. */
export const lineAndLoad = (row: readonly number[]): [number, number] => [
  row[INPUTS.indexOf('line')]!,
  row[INPUTS.indexOf('load')]!,
]

export function voltageModeModel(stage: AveragedStage, rampAmplitude: number): LinearModel {
  const { network, dutyToState, dutyToOutput } = stage
  return {
    A: network.A,
    B: network.B.map((row, i) => [dutyToState[i]! / rampAmplitude, ...lineAndLoad(row)]),
    C: network.C[MEASURES.outputVoltage]!,
    D: [dutyToOutput / rampAmplitude, ...lineAndLoad(network.D[MEASURES.outputVoltage]!)],
  }
}

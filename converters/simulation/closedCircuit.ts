/**
 * Power stage and error amplifier as one switched circuit. The amplifier's states follow the output's distance from its
 * target; the control voltage is v_c = V_c0 − y, y being the network's output with the inversion removed.
 */
import { MEASURES, type Circuit, type Interval } from '../circuit'
import { networkStateSpace, networkWithHeldOutput, type Network } from '../compensators/networks'
import { INPUTS } from '../network'

/** Inputs that the closed loop adds after those of the power stage. */
export const TARGET = INPUTS.length // V that the output is regulated to
export const BIAS = INPUTS.length + 1 // V_c0

export interface ClosedCircuit extends Circuit {
  /** Index of the state at which the amplifier's limits act, and its sign in the control voltage. */
  readonly amplifierState: number
  readonly amplifierSign: 1 | -1
}

/** @param bias - V_c0; the control voltage at rest. */
export function closeCircuit(circuit: Circuit, given: Network, bias = 0): ClosedCircuit {
  const { network, outputState } = networkWithHeldOutput(given)
  const { A: Ac, B: Bc, C: Cc, D: Dc } = networkStateSpace(network)
  const n = circuit.states.length
  const m = Ac.length
  const through = Dc[0]![0]!
  const extend = (interval: Interval): Interval => {
    const output = interval.C[MEASURES.outputVoltage]!
    const outputThrough = interval.D[MEASURES.outputVoltage]!
    return {
      A: [
        ...interval.A.map((row) => [...row, ...new Array<number>(m).fill(0)]),
        ...Ac.map((row, i) => [...output.map((c) => Bc[i]![0]! * c), ...row]),
      ],
      B: [
        ...interval.B.map((row) => [...row, 0, 0]),
        ...Bc.map(([b]) => [...outputThrough.map((d) => b! * d), -b!, 0]),
      ],
      C: interval.C.map((row) => [...row, ...new Array<number>(m).fill(0)]),
      D: interval.D.map((row) => [...row, 0, 0]),
    }
  }
  // A direct path from output to control would let the comparator see the output's own steps; no network here has one,
  // as each holds its output on a capacitor or on the amplifier's finite bandwidth.
  if (through !== 0) throw new RangeError(`the network feeds ${through} of the output straight through`)
  return {
    ...circuit,
    states: [...circuit.states, ...Ac.map((_, i) => `amplifier${i}`)],
    inputs: [...circuit.inputs, circuit.design.output.voltage, bias],
    control: {
      overStates: [...circuit.states.map(() => 0), ...Cc[0]!.map((c) => -c)],
      overInputs: [...INPUTS.map(() => 0), 0, 1],
    },
    on: extend(circuit.on),
    off: extend(circuit.off),
    idle: extend(circuit.idle),
    amplifierState: n + outputState,
    amplifierSign: Cc[0]![outputState]! > 0 ? -1 : 1,
  }
}

/** The averaged plant with its error amplifier: one linear system, from line and load to the output. */
import { CONTROL, LINE, LOAD, type LinearModel } from '../averaged/linearModel'
import type { StateSpace } from '../compensators/stateSpace'

export interface ClosedLoopSystem {
  readonly A: number[][] // n × n, plant states first
  /** From line voltage (V) and current drawn (A), n × 2. */
  readonly B: number[][]
  readonly C: number[] // output voltage
  readonly D: number[]
}

/**
 * v_c = −(C_c·q + D_c·y) closes ẋ = A·x + b·v_c + B·w, y = C·x + d·v_c + D·w. With both feeding through, y is
 * divided by 1 + d·D_c.
 */
export function closeLoop(plant: LinearModel, amplifier: StateSpace): ClosedLoopSystem {
  const Cc = amplifier.C[0]!
  const Dc = amplifier.D[0]![0]!
  const d = plant.D[CONTROL]!
  const share = 1 / (1 + d * Dc)
  const C = [...plant.C.map((c) => c * share), ...Cc.map((c) => -d * c * share)]
  const D = [LINE, LOAD].map((input) => plant.D[input]! * share)
  // Control voltage over the joint states and the inputs.
  const control = C.map((c, j) => -Dc * c - (j < plant.C.length ? 0 : Cc[j - plant.C.length]!))
  const controlThrough = D.map((value) => -Dc * value)
  const fromPlant = plant.A.map((row, i) => {
    const b = plant.B[i]![CONTROL]!
    return control.map((value, j) => (row[j] ?? 0) + b * value)
  })
  const fromAmplifier = amplifier.A.map((row, i) => {
    const b = amplifier.B[i]![0]!
    return C.map((value, j) => (j < plant.C.length ? 0 : row[j - plant.C.length]!) + b * value)
  })
  return {
    A: [...fromPlant, ...fromAmplifier],
    B: [
      ...plant.B.map((row) => [LINE, LOAD].map((input, k) => row[input]! + row[CONTROL]! * controlThrough[k]!)),
      ...amplifier.B.map((row) => D.map((value) => row[0]! * value)),
    ],
    C,
    D,
  }
}

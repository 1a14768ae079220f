/**
 * Peak current mode in continuous conduction, with the sampled-data gain of the current loop.
 *   d̂·(S_n + S_e)·T = v̂_c − H_e(s)·R_s·î + k₁·m̂₁ + k₂·m̂₂,   H_e = 1 + s/(ω_n·Q_z) + s²/ω_n²,  ω_n = π·f_sw, Q_z = −2/π
 * m₁ and m₂ are the rising and falling slopes of the sensed signal; their weights k₁ = −T·D·(1 − D/2), k₂ = T·D′²/2
 * follow from the steady ripple's geometry and give Ridley's k_f and k_r for each topology.
 * Source: Ridley, "A new, continuous-time model for current-mode control", IEEE Trans. Power Electronics 1991.
 *
 * H_e has more zeros than poles. Writing it in the time domain makes the duty a state of its own, whose equation holds
 * the pair of poles near half the switching frequency, so that poles and zeros come from one ordinary system.
 */
import { MEASURES, type Circuit } from '../circuit'
import { dot } from '../switched/flow'
import { lineAndLoad, type AveragedStage } from './continuous'
import type { LinearModel } from './linearModel'

export interface CurrentModeSlopes {
  readonly rising: number // S_n, V/s of the sensed signal
  readonly falling: number // S_f, V/s
  readonly compensation: number // S_e, V/s
}

/** Slopes of the sensed signal at the averaged rest point. */
export function sensedSlopes(circuit: Circuit, stage: AveragedStage): CurrentModeSlopes {
  const { modulator } = circuit.design
  if (modulator.kind !== 'peak-current-mode') throw new TypeError('slopes of a sensed current need current mode')
  const k = sensedRow(circuit)
  const slope = (A: number[][], B: number[][]) =>
    A.reduce((sum, row, i) => sum + k[i]! * (dot(row, stage.rest) + dot(B[i]!, circuit.inputs)), 0)
  return {
    rising: slope(circuit.on.A, circuit.on.B),
    falling: -slope(circuit.off.A, circuit.off.B),
    compensation: modulator.slopeCompensation,
  }
}

/** R_s times the switch current over the states. */
function sensedRow({ design: { modulator }, on }: Circuit): number[] {
  const resistance = modulator.kind === 'peak-current-mode' ? modulator.currentSenseResistance : 0
  return on.C[MEASURES.switchCurrent]!.map((value) => value * resistance)
}

export function currentModeModel(circuit: Circuit, stage: AveragedStage, dutyCycle: number): LinearModel {
  const { on, off, period } = circuit
  const { network, dutyToState: E, dutyToOutput } = stage
  const n = network.A.length
  const k = sensedRow(circuit)
  const slopes = sensedSlopes(circuit, stage)
  const offDuty = 1 - dutyCycle
  const naturalFrequency = Math.PI / period
  const first = 1 / (naturalFrequency * (-2 / Math.PI))
  const second = 1 / naturalFrequency ** 2
  const risingWeight = -period * dutyCycle * (1 - dutyCycle / 2)
  const fallingWeight = (period * offDuty * offDuty) / 2

  const timesMatrix = (row: readonly number[], matrix: number[][]) =>
    matrix[0]!.map((_, j) => row.reduce((sum, value, i) => sum + value * matrix[i]![j]!, 0))
  const kA = timesMatrix(k, network.A)
  const kAA = timesMatrix(kA, network.A)
  const kB = lineAndLoad(timesMatrix(k, network.B))
  const kAB = lineAndLoad(timesMatrix(kA, network.B))
  const kE = dot(k, E)
  const kAE = dot(kA, E)
  const kOnA = timesMatrix(k, on.A)
  const kOffA = timesMatrix(k, off.A)
  const kOnB = lineAndLoad(timesMatrix(k, on.B))
  const kOffB = lineAndLoad(timesMatrix(k, off.B))

  // Everything in d̂·(S_n + S_e)·T = … that is not d̂'s own derivative, over states, duty and inputs.
  const overStates = k.map(
    (value, j) => -value - first * kA[j]! - second * kAA[j]! + risingWeight * kOnA[j]! - fallingWeight * kOffA[j]!,
  )
  const overDuty = -(slopes.rising + slopes.compensation) * period - first * kE - second * kAE
  const overInputs = kB.map(
    (value, j) => -first * value - second * kAB[j]! + risingWeight * kOnB[j]! - fallingWeight * kOffB[j]!,
  )
  // The line's derivative is absorbed: the state is δ = d̂ + (k·B/k·E)·û instead of d̂.
  const shift = kB.map((value) => value / kE)
  const gain = 1 / (second * kE)
  const output = network.C[MEASURES.outputVoltage]!
  const through = lineAndLoad(network.D[MEASURES.outputVoltage]!)
  return {
    A: [...network.A.map((row, i) => [...row, E[i]!]), [...overStates.map((v) => v * gain), overDuty * gain]],
    B: [
      ...network.B.map((row, i) => [0, ...lineAndLoad(row).map((value, j) => value - E[i]! * shift[j]!)]),
      [gain, ...overInputs.map((value, j) => (value - overDuty * shift[j]!) * gain)],
    ],
    C: [...output.slice(0, n), dutyToOutput],
    D: [0, ...through.map((value, j) => value - dutyToOutput * shift[j]!)],
  }
}

/**
 * Operating point and small-signal model from averaging alone: ripple is left out of the mean, so duty and rest point
 * differ from those of the exact orbit by terms of the ripple squared.
 */
import { averageStage, voltageModeModel, type AveragedStage } from '../averaged/continuous'
import { currentModeModel } from '../averaged/currentMode'
import { averages, discontinuousModel } from '../averaged/discontinuous'
import type { LinearModel } from '../averaged/linearModel'
import { MEASURES, type Circuit } from '../circuit'
import { flatten, solveReal } from '../numeric/linearSystem'
import { derivative, dot, read } from '../switched/flow'
import { openPlant } from '../plant'
import { findOrbit } from '../switched/orbit'

export interface AveragedPoint {
  readonly conduction: 'continuous' | 'discontinuous'
  readonly dutyCycle: number
  readonly model: LinearModel
}

/** Share of the wanted output within which it must be met. */
const MET = 1e-10
const MOST_STEPS = 12

/**
 * @param guess - duty cycle of a circuit like this one.
 * @throws DesignError when no duty cycle gives the wanted output.
 */
export function averagedPoint(circuit: Circuit, guess: number): AveragedPoint {
  // The search near the guess cannot tell why it fails; the orbit's own search can, and sees every branch.
  const duty = dutyNear(circuit, guess) ?? findOrbit(circuit).dutyCycle
  const stage = averageStage(circuit, duty)
  const { rectifier, modulator } = circuit.design
  const valley = rectifier.kind === 'diode' ? rectifierValley(circuit, stage, duty) : Infinity
  if (valley < 0 && circuit.canStop) {
    const rest = discontinuousRest(circuit, stage, duty, valley)
    if (!rest) return exactPoint(circuit)
    const model = discontinuousModel(circuit, rest.dutyCycle, rest.state)
    return { conduction: 'discontinuous', dutyCycle: rest.dutyCycle, model }
  }
  return {
    conduction: valley < 0 ? 'discontinuous' : 'continuous',
    dutyCycle: duty,
    model:
      modulator.kind === 'voltage-mode'
        ? voltageModeModel(stage, modulator.rampAmplitude)
        : currentModeModel(circuit, stage, duty),
  }
}

/** About the exact orbit, which also knows on which side of the boundary a point just beside it lies. */
function exactPoint({ design, lineVoltage, outputCurrent }: Circuit): AveragedPoint {
  const { orbit, model } = openPlant(design, { lineVoltage, outputCurrent })
  return { conduction: orbit.conduction, dutyCycle: orbit.dutyCycle, model }
}

/** Newton's method on the averaged output, along the branch on which it rises with duty; null if that leads nowhere. */
function dutyNear(circuit: Circuit, guess: number): number | null {
  const { inputs, design } = circuit
  const wanted = design.output.voltage
  let duty = guess
  for (let step = 0; step < MOST_STEPS; step++) {
    const { network, rest, dutyToState, dutyToOutput } = averageStage(circuit, duty)
    const output = network.C[MEASURES.outputVoltage]!
    const error = dot(output, rest) + dot(network.D[MEASURES.outputVoltage]!, inputs) - wanted
    if (Math.abs(error) <= MET * wanted) return duty
    const moved = Float64Array.from(dutyToState)
    if (!solveReal(flatten(network.A), moved.length, moved, 1)) return null
    const slope = dutyToOutput - dot(output, moved)
    if (!(slope > 0)) return null
    duty -= error / slope
    if (!(duty > 0 && duty <= design.dutyLimit)) return null
  }
  return null
}

/** The rectifier's current where its interval ends, currents taken as straight about their means. */
function rectifierValley(circuit: Circuit, { rest }: AveragedStage, duty: number): number {
  const slopes = derivative(circuit.off, rest, circuit.inputs)
  const middle = read(circuit.off, MEASURES.rectifierCurrent, rest, circuit.inputs)
  const row = circuit.off.C[MEASURES.rectifierCurrent]!
  return middle + (dot(row, slopes) * (1 - duty) * circuit.period) / 2
}

/**
 * Rest point of the averaged equations in discontinuous conduction, with the duty that gives the wanted output: Newton's
 * method with differences for derivatives, from the mean state of continuous conduction and the duty that scales with
 * the root of the current. Null where it does not settle.
 */
function discontinuousRest(
  circuit: Circuit,
  stage: AveragedStage,
  continuousDuty: number,
  valley: number,
): { dutyCycle: number; state: Float64Array } | null {
  const { inputs, design, off, stoppingState } = circuit
  const wanted = design.output.voltage
  const n = stage.rest.length
  const middle = read(off, MEASURES.rectifierCurrent, stage.rest, inputs)
  // States, then the duty.
  const unknowns = Float64Array.from([...stage.rest, continuousDuty * Math.sqrt(middle / (middle - valley))])
  const residuals = (at: Float64Array): Float64Array => {
    const { derivatives, output } = averages(circuit, at.subarray(0, n), inputs, at[n]!)
    return Float64Array.from([...derivatives, output - wanted])
  }
  const size = n + 1
  for (let step = 0; step < 3 * MOST_STEPS; step++) {
    const change = residuals(unknowns)
    const matrix = new Float64Array(size * size)
    for (let j = 0; j < size; j++) {
      const kept = unknowns[j]!
      const by = 1e-6 * Math.max(Math.abs(kept), 1e-6)
      unknowns[j] = kept + by
      const above = residuals(unknowns)
      unknowns[j] = kept - by
      const below = residuals(unknowns)
      unknowns[j] = kept
      for (let i = 0; i < size; i++) matrix[i * size + j] = (above[i]! - below[i]!) / (2 * by)
    }
    if (!solveReal(matrix, size, change, 1)) return null
    const largest = Math.max(relative(change, unknowns, stoppingState), relative(change, unknowns, n))
    if (!Number.isFinite(largest)) return null
    const damping = Math.min(1, 0.5 / largest)
    for (let j = 0; j < size; j++) unknowns[j]! -= damping * change[j]!
    if (largest > 1e-10) continue
    const dutyCycle = unknowns[n]!
    return dutyCycle > 0 && dutyCycle < design.dutyLimit ? { dutyCycle, state: unknowns.slice(0, n) } : null
  }
  return null
}

const relative = (change: Float64Array, unknowns: Float64Array, i: number): number =>
  Math.abs(change[i]! / unknowns[i]!)

/**
 * Operating point and small-signal model from averaging alone: ripple is left out of the mean, so duty and rest point
 * differ from those of the exact orbit by terms of the ripple squared.
 */
import { averageStage, voltageModeModel, type AveragedStage } from '../averaged/continuous'
import { currentModeModel } from '../averaged/currentMode'
import { discontinuousModel } from '../averaged/discontinuous'
import type { LinearModel } from '../averaged/linearModel'
import { MEASURES, type Circuit } from '../circuit'
import { openPlant } from '../plant'
import { derivative, dot, read } from '../switched/flow'
import { dutyNear } from './averagedDuty'
import { discontinuousRest } from './discontinuousRest'

export interface AveragedPoint {
  readonly conduction: 'continuous' | 'discontinuous'
  readonly dutyCycle: number
  readonly model: LinearModel
}

/** Measures that a circuit needs for this: those of output, switch and rectifier, which come first. */
export const AVERAGED_MEASURES = MEASURES.rectifierCurrent + 1

/**
 * @param guess - duty cycle of a circuit like this one.
 * @throws DesignError when no duty cycle gives the wanted output.
 */
export function averagedPoint(circuit: Circuit, guess: number): AveragedPoint {
  const duty = dutyNear(circuit, guess)
  // The search near the guess cannot tell why it fails; the orbit's own search can, and sees every branch.
  if (duty === null) return exactPoint(circuit)
  const stage = averageStage(circuit, duty)
  const { rectifier, modulator } = circuit.design
  const valley = rectifier.kind === 'diode' ? rectifierValley(circuit, stage, duty) : Infinity
  if (valley < 0 && circuit.canStop) return discontinuousPoint(circuit, stage, duty, valley)
  return {
    conduction: valley < 0 ? 'discontinuous' : 'continuous',
    dutyCycle: duty,
    model:
      modulator.kind === 'voltage-mode'
        ? voltageModeModel(stage, modulator.rampAmplitude)
        : currentModeModel(circuit, stage, duty),
  }
}

/** The rectifier's current where its interval ends, currents taken as straight about their means. */
function rectifierValley(circuit: Circuit, { rest }: AveragedStage, duty: number): number {
  const slopes = derivative(circuit.off, rest, circuit.inputs)
  const row = circuit.off.C[MEASURES.rectifierCurrent]!
  return rectifierMean(circuit, rest) + (dot(row, slopes) * (1 - duty) * circuit.period) / 2
}

/** While it conducts. */
const rectifierMean = ({ off, inputs }: Circuit, rest: Float64Array): number =>
  read(off, MEASURES.rectifierCurrent, rest, inputs)

/** From the duty of continuous conduction, scaled as the root of the current below the boundary. */
function discontinuousPoint(circuit: Circuit, { rest }: AveragedStage, duty: number, valley: number): AveragedPoint {
  const mean = rectifierMean(circuit, rest)
  const found = discontinuousRest(circuit, rest, duty * Math.sqrt(mean / (mean - valley)))
  if (!found) return exactPoint(circuit)
  const { dutyCycle, state } = found
  return { conduction: 'discontinuous', dutyCycle, model: discontinuousModel(circuit, dutyCycle, state) }
}

/** About the exact orbit, which also knows on which side of the boundary a point just beside it lies. */
function exactPoint({ design, lineVoltage, outputCurrent }: Circuit): AveragedPoint {
  const { orbit, model } = openPlant(design, { lineVoltage, outputCurrent })
  return { conduction: orbit.conduction, dutyCycle: orbit.dutyCycle, model }
}

/** Ramp, or sense resistance and slope compensation. */
import type { DesignDocumentInput } from '../document'
import { preferredValues } from '../compensators/preferredNumbers'
import { formatQuantity } from '../quantities'
import type { StageChoice } from '../results'
import type { StageRequirements } from '../stageRequirements'
import { stageAt, unitRipple } from './budget'

const RAMP = 1 // V, peak to peak
/** V at the comparator at the highest peak current: well above noise, well below a controller's usual limit of 1 V. */
const SENSED_PEAK = 0.5
/** Of the sensed down-slope. Half is what holds at every duty cycle; a fifth more covers an inductance 20 % low. */
const SLOPE_SHARE = 0.5
const SLOPE_RESERVE = 1.2

export interface ModulatorProposal {
  readonly modulator: DesignDocumentInput['modulator']
  readonly choices: readonly StageChoice[]
}

export function chooseModulator(requirements: StageRequirements, inductance: number): ModulatorProposal {
  return requirements.controlScheme === 'voltage-mode' ? chooseRamp() : chooseCurrentSense(requirements, inductance)
}

function chooseRamp(): ModulatorProposal {
  return {
    modulator: { kind: 'voltage-mode', rampAmplitude: RAMP },
    choices: [
      {
        field: 'modulator.rampAmplitude',
        value: RAMP,
        unit: 'V',
        reason: `${formatQuantity(RAMP, 'V')} is a usual ramp of a controller; take that of yours. The loop gain goes as one over it.`,
      },
    ],
  }
}

function chooseCurrentSense(requirements: StageRequirements, inductance: number): ModulatorProposal {
  const { line, switchingFrequency } = requirements
  const points = [line.minimum, line.maximum].map((lineVoltage) => stageAt(requirements, lineVoltage))
  const peak = Math.max(
    ...points.map((point) => point.inductorCurrent + unitRipple(point, switchingFrequency) / inductance / 2),
  )
  const largest = SENSED_PEAK / peak
  const currentSenseResistance = preferredValues('E24', largest / 1.2, largest).at(-1)!
  const downSlope = Math.max(...points.map((point) => point.offVoltage)) / inductance
  const least = SLOPE_SHARE * currentSenseResistance * downSlope
  const slopeCompensation = roundedUp(SLOPE_RESERVE * least)
  return {
    modulator: { kind: 'peak-current-mode', currentSenseResistance, slopeCompensation },
    choices: [
      {
        field: 'modulator.currentSenseResistance',
        value: currentSenseResistance,
        unit: 'Ω',
        reason: `The highest peak current at full load, ${formatQuantity(peak, 'A')}, gives ${formatQuantity(peak * currentSenseResistance, 'V')} at the comparator: above its noise, below the limit of common controllers.`,
      },
      {
        field: 'modulator.slopeCompensation',
        value: slopeCompensation,
        unit: 'V/s',
        reason: `Half of the steepest sensed down-slope, ${formatQuantity(least, 'V/s')}, keeps the current loop from subharmonic oscillation at every duty cycle (Erickson and Maksimović 2001, section 12.1); a fifth more covers an inductance 20 % low.`,
      },
    ],
  }
}

/** Two figures, never below the value. */
function roundedUp(value: number): number {
  const step = 10 ** (Math.floor(Math.log10(value)) - 1)
  return Number((Math.ceil(value / step) * step).toPrecision(2))
}

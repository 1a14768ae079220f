/** The quick start: from the few figures that a designer has on the first day to a whole power stage with reasons. */
import { preferredValues, nearestValues } from './compensators/preferredNumbers'
import type { DesignDocument, DesignDocumentInput } from './document'
import { DesignError } from './errors'
import { invalid, parseDesign, problemsOf } from './parse'
import { openPlant } from './plant'
import { formatQuantity } from './quantities'
import type { StageChoice } from './results'
import { rectifierDrop, stageAt, unitRipple, worstRippleLine } from './stage/budget'
import { chooseModulator } from './stage/modulator'
import { chooseOutputCapacitors } from './stage/outputCapacitors'
import { StageRequirements, type StageRequirementsInput } from './stageRequirements'

export interface StageProposal {
  readonly design: DesignDocument
  readonly choices: readonly StageChoice[]
}

/** Share of the output power that each resistance may lose at full load. Common practice, no source. */
const LOSS_SHARE = 0.01
/** A single boost stage beyond this duty cycle loses its efficiency and its crossover. Common practice, no source. */
const LARGEST_DUTY = 0.9
const REFERENCE = 0.8 // V
const DIVIDER_CURRENT = 0.5e-3 // A
/** Gain-bandwidth of the error amplifier over the switching frequency, so that it has gain in hand at crossover. */
const BANDWIDTH_RATIO = 20

/**
 * Proposes a power stage for line range, output, load range and switching frequency.
 * @param requirements - see `StageRequirements`; checked here.
 * @throws DesignError at the requirement that cannot be met.
 */
export function proposeStage(requirements: StageRequirementsInput): StageProposal {
  const result = StageRequirements.safeParse(requirements)
  if (!result.success) throw invalid(problemsOf(result.error))
  const checked = result.data
  checkReach(checked)
  const inductor = chooseInductance(checked)
  const resistance = lossyResistance(checked)
  const capacitors = chooseOutputCapacitors(checked, inductor.value)
  const modulator = chooseModulator(checked, inductor.value)
  const sense = chooseSense(checked)
  const gainBandwidth = Math.max(10e6, BANDWIDTH_RATIO * checked.switchingFrequency)
  const { topology, switchingFrequency, line, output, rectifier } = checked
  const input: DesignDocumentInput = {
    topology,
    switchingFrequency,
    line,
    output,
    inductor: { inductance: inductor.value, resistance: resistance.value },
    outputCapacitors: [...capacitors.banks],
    switch: { onResistance: resistance.value },
    rectifier: { kind: rectifier, onResistance: resistance.value, forwardVoltage: rectifierDrop(checked) },
    modulator: modulator.modulator,
    sense: sense.sense,
    amplifier: { kind: 'op-amp', gainBandwidth },
  }
  const design = parseDesign(input)
  // Losses may take what the ideal ratio leaves: the exact operating point has the last word.
  openPlant(design, { lineVoltage: line.minimum, outputCurrent: output.currentMaximum })
  return {
    design,
    choices: [
      inductor,
      resistance,
      ...capacitors.choices,
      ...modulator.choices,
      ...sense.choices,
      {
        field: 'amplifier.gainBandwidth',
        value: gainBandwidth,
        unit: 'Hz',
        reason: `At least ${BANDWIDTH_RATIO} times the switching frequency, so that the amplifier has gain in hand at a crossover up to a fifth of it (common practice, no source).`,
      },
    ],
  }
}

/** Refuses what the topology cannot do, with the figure that could be reached. */
function checkReach({ topology, line, output }: StageRequirements): void {
  const volts = (value: number) => formatQuantity(value, 'V')
  if (topology === 'buck') {
    if (output.voltage < LARGEST_BUCK_RATIO * line.minimum) return
    throw DesignError.at(
      'unreachable-output',
      'output.voltage',
      `A buck lowers its line: from ${volts(line.minimum)} it reaches ${volts(LARGEST_BUCK_RATIO * line.minimum)} with some duty cycle in hand, not ${volts(output.voltage)}.`,
    )
  }
  if (topology === 'boost') {
    if (output.voltage <= line.maximum) {
      throw DesignError.at(
        'unreachable-output',
        'output.voltage',
        `A boost raises its line: the output of ${volts(output.voltage)} has to lie above the highest line of ${volts(line.maximum)}.`,
      )
    }
    if (1 - line.minimum / output.voltage <= LARGEST_DUTY) return
    throw DesignError.at(
      'unreachable-output',
      'output.voltage',
      `From ${volts(line.minimum)} a single boost stage sensibly reaches ${volts(line.minimum / (1 - LARGEST_DUTY))} (a duty cycle of ${LARGEST_DUTY}), not ${volts(output.voltage)}.`,
    )
  }
  throw DesignError.at(
    'not-yet-supported',
    'topology',
    `The quick start knows buck and boost; ${topology} is not there yet.`,
  )
}

/** Leaves some duty cycle for losses and for the loop to move in. Common practice, no source. */
const LARGEST_BUCK_RATIO = 0.9

function chooseInductance(requirements: StageRequirements): StageChoice {
  const { switchingFrequency, rippleRatio } = requirements
  const lineVoltage = worstRippleLine(requirements)
  const point = stageAt(requirements, lineVoltage)
  const ripple = unitRipple(point, switchingFrequency)
  const computed = ripple / (rippleRatio * point.inductorCurrent)
  const value = nearestValues(preferredValues('E12', computed / 2, computed * 2), computed, 1)[0]!
  const amperes = ripple / value
  return {
    field: 'inductor.inductance',
    value,
    unit: 'H',
    reason: `Ripple of ${formatQuantity(amperes, 'A')} peak to peak at ${formatQuantity(lineVoltage, 'V')}, where it is worst: ${formatQuantity(amperes / point.inductorCurrent, '%', 2)} of the mean inductor current of ${formatQuantity(point.inductorCurrent, 'A')} at full load. Wanted ${formatQuantity(rippleRatio, '%', 2)}, nearest value of E12.`,
  }
}

/** One resistance for winding, switch and rectifier each, by what it may lose. */
function lossyResistance(requirements: StageRequirements): StageChoice {
  const { output, line } = requirements
  const { inductorCurrent } = stageAt(requirements, line.minimum)
  const exact = (LOSS_SHARE * output.voltage * output.currentMaximum) / inductorCurrent ** 2
  return {
    field: 'inductor.resistance',
    value: Number(exact.toPrecision(2)),
    unit: 'Ω',
    reason: `Loses ${formatQuantity(LOSS_SHARE, '%', 2)} of the output power at full load and ${formatQuantity(line.minimum, 'V')}; switch and rectifier start with the same. Replace them by the figures of the parts.`,
  }
}

function chooseSense({ output }: StageRequirements) {
  const referenceVoltage = Math.min(REFERENCE, output.voltage)
  const exact = Math.max(10e3, (output.voltage - referenceVoltage) / DIVIDER_CURRENT)
  const upperResistance = nearestValues(preferredValues('E12', 8e3, 1e9), exact, 1)[0]!
  const choices: StageChoice[] = [
    {
      field: 'sense.referenceVoltage',
      value: referenceVoltage,
      unit: 'V',
      reason: 'A usual reference of a controller; take that of yours.',
    },
    {
      field: 'sense.upperResistance',
      value: upperResistance,
      unit: 'Ω',
      reason: `Keeps the divider's current below about ${formatQuantity(DIVIDER_CURRENT, 'A')}; all other parts of the network scale with it.`,
    },
  ]
  return { sense: { referenceVoltage, upperResistance }, choices }
}

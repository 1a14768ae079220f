/** Output capacitors from ripple voltage and load step: ceramics as far as they go, and a bulk bank beyond. */
import { preferredValues } from '../compensators/preferredNumbers'
import { DesignError } from '../errors'
import { formatQuantity } from '../quantities'
import type { DesignDocumentInput } from '../document'
import type { StageChoice } from '../results'
import type { StageRequirements } from '../stageRequirements'
import { assumedCrossover, stageAt, unitRipple, worstRippleLine } from './budget'

type Bank = DesignDocumentInput['outputCapacitors'][number]

interface Ceramic {
  readonly upTo: number // V at the output
  readonly capacitance: number // F that remains of a common piece at that voltage
}
/** Common multilayer pieces by output voltage. Common practice, no source; the data sheet's curve decides. */
const CERAMICS: readonly Ceramic[] = [
  { upTo: 2.5, capacitance: 100e-6 },
  { upTo: 6, capacitance: 47e-6 },
  { upTo: 12, capacitance: 22e-6 },
  { upTo: 30, capacitance: 10e-6 },
  { upTo: 60, capacitance: 4.7e-6 },
  { upTo: 150, capacitance: 1e-6 },
  { upTo: Infinity, capacitance: 0.1e-6 },
]
const CERAMIC_ESR = 3e-3
const MOST_CERAMICS = 8
/** Polymer pieces below, aluminium electrolytic ones above; common practice, no source. */
const POLYMER_UP_TO = 25 // V
const POLYMER_ESR = 15e-3
const ELECTROLYTIC_TIME = 50e-6 // s, ESR times capacitance
const BULK_PIECES = [22e-6, 47e-6, 100e-6, 220e-6, 470e-6, 1e-3, 2.2e-3, 4.7e-3]
const COMFORTABLE_COUNT = 6
const MOST_PIECES = 100

export interface CapacitorProposal {
  readonly banks: readonly Bank[]
  readonly choices: readonly StageChoice[]
}

/** @throws DesignError when no sensible number of pieces meets the requirements. */
export function chooseOutputCapacitors(requirements: StageRequirements, inductance: number): CapacitorProposal {
  const ripple = capacitanceForRipple(requirements, inductance)
  const step = capacitanceForStep(requirements, inductance)
  const most = Math.max(ripple.capacitance, step.capacitance)
  const largest = CERAMICS.find(({ upTo }) => requirements.output.voltage <= upTo)!.capacitance
  const piece = most >= largest ? largest : preferredValues('E6', most, 10 * most)[0]!
  const needed = Math.ceil(most / piece)
  const isAllCeramic = needed <= MOST_CERAMICS
  const count = isAllCeramic ? needed : Math.min(MOST_CERAMICS, Math.ceil(ripple.capacitance / piece))
  const ceramic: Bank = { count, capacitance: piece, esr: CERAMIC_ESR }
  const reasons = `${ripple.reason} ${step.reason}`
  const choices = bankChoices(
    0,
    ceramic,
    `${reasons} ${formatQuantity(piece, 'F')} has to remain of each ceramic piece at this voltage; take the real figure from its data sheet.`,
  )
  if (isAllCeramic) return { banks: [ceramic], choices }
  const bulk = bulkBank(requirements, most - count * piece)
  const bulkReason = `${reasons} That is more than ${MOST_CERAMICS} ceramic pieces hold, so a bulk bank carries the rest.`
  return { banks: [ceramic, bulk], choices: [...choices, ...bankChoices(1, bulk, bulkReason)] }
}

interface Need {
  readonly capacitance: number // F
  readonly reason: string
}

/** Buck: ΔI/(8·f·C); boost: I·D/(f·C). Erickson and Maksimović 2001, sections 2.5 and 2.3. */
function capacitanceForRipple(requirements: StageRequirements, inductance: number): Need {
  const { topology, switchingFrequency, output, line, outputRipple } = requirements
  const allowed = outputRipple * output.voltage
  const boostCharge = (output.currentMaximum * stageAt(requirements, line.minimum).dutyCycle) / switchingFrequency
  const buckRipple = unitRipple(stageAt(requirements, worstRippleLine(requirements)), switchingFrequency) / inductance
  const charge = topology === 'boost' ? boostCharge : buckRipple / (8 * switchingFrequency)
  const capacitance = charge / allowed
  return {
    capacitance,
    reason: `A ripple of ${formatQuantity(allowed, 'V')} (${formatQuantity(outputRipple, '%', 2)}) takes ${formatQuantity(capacitance, 'F')}.`,
  }
}

/** Until the loop answers, after about 1/(2π·crossover), the capacitors carry the step alone; a buck's inductor then empties into them. */
function capacitanceForStep(requirements: StageRequirements, inductance: number): Need {
  const { topology, output, loadStep, outputDeviation } = requirements
  const step = loadStep * output.currentMaximum
  const allowed = outputDeviation * output.voltage
  const crossover = assumedCrossover(requirements, inductance)
  const untilAnswer = step / (2 * Math.PI * crossover * allowed)
  const release = topology === 'buck' ? (inductance * step ** 2) / (2 * output.voltage * allowed) : 0
  const capacitance = Math.max(untilAnswer, release)
  const cause =
    release > untilAnswer
      ? 'the inductor’s energy after the load has gone'
      : `a crossover of ${formatQuantity(crossover, 'Hz')}`
  return {
    capacitance,
    reason: `A load step of ${formatQuantity(step, 'A')} within ${formatQuantity(allowed, 'V')} takes ${formatQuantity(capacitance, 'F')}, by ${cause}.`,
  }
}

function bulkBank({ output }: StageRequirements, capacitance: number): Bank {
  const piece = BULK_PIECES.find((one) => capacitance <= COMFORTABLE_COUNT * one) ?? BULK_PIECES.at(-1)!
  const count = Math.ceil(capacitance / piece)
  if (count > MOST_PIECES) {
    throw DesignError.at(
      'invalid-document',
      'outputDeviation',
      `Holding the output that tightly would take ${formatQuantity(capacitance, 'F')}. Allow a larger deviation or ripple, or raise the switching frequency.`,
    )
  }
  const esr = output.voltage <= POLYMER_UP_TO ? POLYMER_ESR : Number((ELECTROLYTIC_TIME / piece).toPrecision(2))
  return { count, capacitance: piece, esr }
}

function bankChoices(index: number, bank: Bank, reason: string): StageChoice[] {
  const path = `outputCapacitors[${index}]`
  return [
    { field: `${path}.count`, value: bank.count, unit: '', reason },
    { field: `${path}.capacitance`, value: bank.capacitance, unit: 'F', reason },
    {
      field: `${path}.esr`,
      value: bank.esr ?? 0,
      unit: 'Ω',
      reason:
        'Usual for such a piece (common practice, no source); it decides the ESR zero, so take the real figure from its data sheet.',
    },
  ]
}

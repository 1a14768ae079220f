/** What a reviewer would point at, in sentences. */
import { largestLedResistance } from './compensators/shuntOptocoupler'
import type { DesignDocument } from './document'
import type { Analysis, ResponseCurve, Warning } from './results'

/** Direct voltage above which contact is taken to be dangerous: the usual extra-low-voltage limit, V. */
const EXTRA_LOW_VOLTAGE = 60

/** Averaged and switched curves part from here on. */
const APART = { gainDb: 1, phaseDeg: 10 }

type Computed = Omit<Analysis, 'warnings'>

export function warningsFor(design: DesignDocument, analysis: Computed, rightHalfPlaneZero: number | null): Warning[] {
  return [
    ...orbitWarnings(analysis),
    ...switchingWarnings(analysis),
    ...marginWarnings(design, analysis, rightHalfPlaneZero),
    ...modelWarnings(analysis),
    ...filterWarnings(analysis),
    ...biasWarnings(design),
    ...stageWarnings(design, analysis),
  ]
}

function orbitWarnings({ periodMap }: Computed): Warning[] {
  if (periodMap.isStable) return []
  const isAlternating = periodMap.multipliers.some((m) => m.modulus >= 1 && m.real < 0 && Math.abs(m.imaginary) < 1e-6)
  if (!isAlternating) {
    return [
      {
        code: 'unstable-orbit',
        message:
          'Without feedback a disturbance of the power stage grows from period to period; only a loop that is fast enough can hold it.',
        field: 'load',
      },
    ]
  }
  const cure =
    periodMap.slopeNeeded === null
      ? 'More inductance or a lower duty cycle is needed.'
      : `Slope compensation above ${round(periodMap.slopeNeeded)} V/s cures it.`
  return [
    {
      code: 'subharmonic-oscillation',
      message: `The inductor current alternates from period to period: it oscillates at half the switching frequency. ${cure}`,
      field: 'modulator.slopeCompensation',
    },
  ]
}

/** The averaged margins are fine, and the switched loop is not. */
function switchingWarnings({ loop, margins, periodMap }: Computed): Warning[] {
  if (!loop || loop.periodMap.isStable || !margins?.isStable || !periodMap.isStable) return []
  const { controlRipple, rampSpan, firesEarly, multipliers } = loop.periodMap
  const ripple = `The network lets ${round(controlRipple)} V of output ripple through to the comparator, whose other input rises by ${round(rampSpan)} V during the pulse`
  const what = firesEarly
    ? 'so the comparator fires before the pulse should end'
    : multipliers.some((m) => m.modulus >= 1 && m.real < 0)
      ? 'and the pulses alternate between long and short: an oscillation at half the switching frequency'
      : 'and a disturbance of the switching instants grows from period to period'
  return [
    {
      code: 'unstable-switching',
      message: `The margins look fine, yet the switched loop is unstable. ${ripple}, ${what}. Less gain at the switching frequency (a lower last pole or a larger C2), a larger ramp or less output ripple cures it.`,
      field: 'compensator',
    },
  ]
}

function marginWarnings(
  { switchingFrequency }: DesignDocument,
  { margins }: Computed,
  rightHalfPlaneZero: number | null,
): Warning[] {
  if (!margins) return []
  const warnings: Warning[] = []
  const add = (code: Warning['code'], message: string) => warnings.push({ code, message, field: 'compensator' })
  if (!margins.isStable) add('unstable-loop', 'The loop is unstable: the loop gain encircles the critical point.')
  if (margins.isStable && margins.gainReductionMargin !== null) {
    add(
      'conditionally-stable',
      `The loop is stable only while its gain stays up: a fall by ${margins.gainReductionMargin.toFixed(1)} dB makes it oscillate, for example at start-up or when the amplifier saturates.`,
    )
  }
  if (margins.gainCrossings.length > 1) {
    add(
      'several-crossovers',
      `The loop gain passes 0 dB ${margins.gainCrossings.length} times; the smallest phase margin of all of them is shown.`,
    )
  }
  const { crossover } = margins
  if (crossover === null) return warnings
  if (rightHalfPlaneZero !== null && crossover > rightHalfPlaneZero / 3) {
    add(
      'crossover-above-right-half-plane-zero',
      `The crossover lies above a third of the right-half-plane zero at ${round(rightHalfPlaneZero)} Hz (common practice); corners will eat the phase margin.`,
    )
  }
  if (crossover > switchingFrequency / 5) {
    add(
      'crossover-near-switching',
      'The crossover lies above a fifth of the switching frequency (common practice); ripple at the amplifier output disturbs the comparator.',
    )
  }
  return warnings
}

function modelWarnings({ frequencies, loop, margins }: Computed): Warning[] {
  if (!loop || !margins || margins.crossover === null) return []
  const parting = firstParting(frequencies, loop.response.averaged, loop.response.switched)
  if (parting === null || parting > 2 * margins.crossover) return []
  return [
    {
      code: 'models-part',
      message: `Averaged and switched model differ by more than ${APART.gainDb} dB or ${APART.phaseDeg}° from ${round(parting)} Hz on; the margins are read from the switched one.`,
      field: null,
    },
  ]
}

function firstParting(frequencies: readonly number[], a: ResponseCurve, b: ResponseCurve): number | null {
  const index = a.findIndex((point, i) => {
    const other = b[i]!
    const phase = point.phaseDeg - other.phaseDeg
    const apart = Math.abs(phase - 360 * Math.round(phase / 360))
    return Math.abs(point.gainDb - other.gainDb) > APART.gainDb || apart > APART.phaseDeg
  })
  return index < 0 ? null : frequencies[index]!
}

/** V of the pull-up where the document does not say; common practice, no source. */
const USUAL_SUPPLY = 5

/** A LED resistor so large that the optocoupler cannot pull its collector down. */
function biasWarnings({ amplifier, output, sense }: DesignDocument): Warning[] {
  if (amplifier.kind !== 'shunt-optocoupler') return []
  const supplyVoltage = amplifier.outputLimits?.maximum ?? USUAL_SUPPLY
  const largest = largestLedResistance({
    ...amplifier,
    outputVoltage: output.voltage,
    referenceVoltage: sense.referenceVoltage,
    supplyVoltage,
  })
  if (largest !== null && amplifier.ledResistance <= largest) return []
  const message =
    largest === null
      ? 'The output voltage leaves nothing for the LED above the shunt reference; no LED resistor can work.'
      : `With this LED resistor the optocoupler cannot pull its collector down from ${supplyVoltage} V; it may be at most ${round(largest)} Ω.`
  return [{ code: 'optocoupler-bias', message, field: 'amplifier.ledResistance' }]
}

function filterWarnings({ inputFilter }: Computed): Warning[] {
  if (!inputFilter?.suggestion) return []
  const { margin, marginFrequency, suggestion } = inputFilter
  const near =
    margin < 0
      ? `exceeds the input impedance of the converter by ${(-margin).toFixed(1)} dB`
      : `comes within ${margin.toFixed(1)} dB of the input impedance of the converter`
  return [
    {
      code: 'input-filter',
      message: `The output impedance of the input filter ${near} at ${round(marginFrequency)} Hz. A damping branch of about ${round(suggestion.dampingCapacitance * 1e6)} µF with ${round(suggestion.dampingResistance)} Ω keeps them apart.`,
      field: 'inputFilter',
    },
  ]
}

function stageWarnings(design: DesignDocument, { operatingPoint }: Computed): Warning[] {
  const warnings: Warning[] = []
  const stops = operatingPoint.rectifierDuty < 1 - operatingPoint.dutyCycle
  if (operatingPoint.conduction === 'discontinuous' && !stops) {
    warnings.push({
      code: 'conduction-not-modelled',
      message: `At this load the rectifier stops conducting before the period ends. For a ${design.topology} only continuous conduction is computed, so these figures do not hold here; raise the load or the inductances, or use a synchronous rectifier.`,
      field: 'output.currentMinimum',
    })
  }
  if (operatingPoint.dutyCycle > 0.95 * design.dutyLimit) {
    warnings.push({
      code: 'duty-near-limit',
      message: `The duty cycle of ${(100 * operatingPoint.dutyCycle).toFixed(1)} % leaves little below the limit of ${(100 * design.dutyLimit).toFixed(0)} %: the loop cannot push further in a load step.`,
      field: 'line.minimum',
    })
  }
  if (operatingPoint.outputRipple > 0.05 * design.output.voltage) {
    warnings.push({
      code: 'ripple-large',
      message: `The output ripple is ${((100 * operatingPoint.outputRipple) / design.output.voltage).toFixed(1)} % of the output; averaging takes it to be small.`,
      field: 'outputCapacitors',
    })
  }
  const highest = Math.max(
    design.line.maximum,
    design.output.voltage,
    operatingPoint.switchVoltage ?? 0,
    operatingPoint.rectifierVoltage,
  )
  if (highest > EXTRA_LOW_VOLTAGE) {
    warnings.push({
      code: 'hazardous-voltage',
      message: `A node reaches ${round(highest)} V, above ${EXTRA_LOW_VOLTAGE} V DC.`,
      field: null,
    })
  }
  return warnings
}

const round = (value: number): string => String(Number(value.toPrecision(3)))

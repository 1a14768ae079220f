/** Every entry of the design document: what it is called on every screen, and its unit. */
import type { Unit } from '@/converters/quantities'

export interface FieldSpec {
  readonly label: string
  readonly unit: Unit
  readonly hint?: string
  /** Left empty it means something: the hint says what. Stored as null. */
  readonly mayBeEmpty?: boolean
}

const FIELDS: Readonly<Record<string, FieldSpec>> = {
  switchingFrequency: { label: 'Switching frequency', unit: 'Hz' },
  'line.minimum': { label: 'Lowest line', unit: 'V' },
  'line.nominal': { label: 'Nominal line', unit: 'V' },
  'line.maximum': { label: 'Highest line', unit: 'V' },
  'output.voltage': { label: 'Output voltage', unit: 'V' },
  'output.currentMinimum': { label: 'Lightest load', unit: 'A' },
  'output.currentMaximum': { label: 'Full load', unit: 'A' },
  'inductor.inductance': { label: 'Inductance', unit: 'H' },
  'inductor.resistance': { label: 'Winding resistance', unit: 'Ω' },
  'secondInductor.inductance': { label: 'Inductance', unit: 'H' },
  'secondInductor.resistance': { label: 'Winding resistance', unit: 'Ω' },
  'couplingCapacitor.capacitance': { label: 'Capacitance', unit: 'F' },
  'couplingCapacitor.esr': { label: 'ESR', unit: 'Ω' },
  'transformer.turnsRatio': { label: 'Turns ratio', unit: '', hint: 'Secondary over primary' },
  'inputFilter.inductance': { label: 'Filter inductance', unit: 'H' },
  'inputFilter.resistance': { label: 'Filter winding resistance', unit: 'Ω' },
  'inputFilter.capacitance': { label: 'Filter capacitance', unit: 'F' },
  'inputFilter.esr': { label: 'Filter capacitor ESR', unit: 'Ω' },
  'inputFilter.dampingCapacitance': {
    label: 'Damping capacitance',
    unit: 'F',
    hint: 'Empty: no damping branch',
    mayBeEmpty: true,
  },
  'inputFilter.dampingResistance': {
    label: 'Damping resistance',
    unit: 'Ω',
    hint: 'In series with the damping capacitance',
    mayBeEmpty: true,
  },
  'outputCapacitors.*.count': { label: 'Pieces in parallel', unit: '' },
  'outputCapacitors.*.capacitance': {
    label: 'Capacitance, each',
    unit: 'F',
    hint: 'As printed, without bias',
  },
  'outputCapacitors.*.biasDerating': {
    label: 'Lost to DC bias',
    unit: '%',
    hint: 'At the output voltage, from the data sheet',
    mayBeEmpty: true,
  },
  'outputCapacitors.*.esr': { label: 'ESR, each', unit: 'Ω' },
  'switch.onResistance': { label: 'Switch on-resistance', unit: 'Ω' },
  'rectifier.onResistance': { label: 'Rectifier on-resistance', unit: 'Ω' },
  'rectifier.forwardVoltage': { label: 'Rectifier forward voltage', unit: 'V' },
  'modulator.rampAmplitude': { label: 'Ramp amplitude', unit: 'V', hint: 'Peak to peak, over one period' },
  'modulator.currentSenseResistance': {
    label: 'Current-sense gain',
    unit: 'Ω',
    hint: 'Volts at the comparator per ampere',
  },
  'modulator.slopeCompensation': { label: 'Slope compensation', unit: 'V/s' },
  dutyLimit: { label: 'Duty limit', unit: '%' },
  'amplifier.gainBandwidth': { label: 'Gain-bandwidth', unit: 'Hz' },
  'amplifier.openLoopGain': { label: 'Open-loop gain', unit: '', hint: 'Volts per volt at DC' },
  'amplifier.transconductance': { label: 'Transconductance', unit: 'S' },
  'amplifier.outputResistance': { label: 'Output resistance', unit: 'Ω' },
  'amplifier.currentTransferRatio': {
    label: 'Current transfer ratio',
    unit: '%',
    hint: 'Collector current over LED current',
  },
  'amplifier.pullUpResistance': { label: 'Pull-up resistor', unit: 'Ω', hint: 'At the collector' },
  'amplifier.ledResistance': { label: 'LED resistor', unit: 'Ω' },
  'amplifier.optocouplerPole': { label: 'Optocoupler pole', unit: 'Hz', hint: 'With this pull-up resistor' },
  'amplifier.outputLimits.minimum': { label: 'Lowest amplifier output', unit: 'V' },
  'amplifier.outputLimits.maximum': { label: 'Highest amplifier output', unit: 'V' },
  'sense.referenceVoltage': { label: 'Reference', unit: 'V' },
  'sense.upperResistance': { label: 'Upper divider resistor', unit: 'Ω' },
  'targets.crossover': { label: 'Wanted crossover', unit: 'Hz', hint: 'Empty: suggested for you', mayBeEmpty: true },
  'targets.phaseMargin': { label: 'Least phase margin', unit: '°' },
  'targets.gainMargin': { label: 'Least gain margin', unit: 'dB' },
  'tolerances.inductance': { label: 'Inductances', unit: '%' },
  'tolerances.capacitance': { label: 'Power capacitors', unit: '%' },
  'tolerances.esr': { label: 'ESR', unit: '%' },
  'tolerances.resistor': { label: 'Network resistors', unit: '%' },
  'tolerances.smallCapacitor': { label: 'Network capacitors', unit: '%' },
  'tolerances.modulator': { label: 'Modulator', unit: '%', hint: 'Ramp, or current sense and slope' },
  'tolerances.amplifier': { label: 'Amplifier', unit: '%', hint: 'Gain-bandwidth, transconductance' },
  'compensator.parts.R1': { label: 'R1', unit: 'Ω', mayBeEmpty: true },
  'compensator.parts.R2': { label: 'R2', unit: 'Ω', mayBeEmpty: true },
  'compensator.parts.R3': { label: 'R3', unit: 'Ω', mayBeEmpty: true },
  'compensator.parts.C1': { label: 'C1', unit: 'F', mayBeEmpty: true },
  'compensator.parts.C2': { label: 'C2', unit: 'F', mayBeEmpty: true },
  'compensator.parts.C3': { label: 'C3', unit: 'F', mayBeEmpty: true },
}

/** What a path's entry is called and measured in. @throws RangeError for a path that no screen edits. */
export function fieldSpec(path: string): FieldSpec {
  const spec = FIELDS[path.replace(/\.\d+\./, '.*.')]
  if (!spec) throw new RangeError(`no entry at ${path}`)
  return spec
}

export function isEntry(path: string): boolean {
  return Object.hasOwn(FIELDS, path.replace(/\.\d+\./, '.*.'))
}

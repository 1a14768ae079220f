/** The two designs that the product is shown with, for tests of the wizard. */
import type { DesignDocumentInput } from '@/converters/document'

/** 12 V to 3.3 V, 8 A logic rail at 500 kHz. */
export const logicRail: DesignDocumentInput = {
  topology: 'buck',
  switchingFrequency: 500e3,
  line: { minimum: 9, nominal: 12, maximum: 15 },
  output: { voltage: 3.3, currentMinimum: 0.5, currentMaximum: 8 },
  inductor: { inductance: 2.2e-6, resistance: 8e-3 },
  outputCapacitors: [{ count: 4, capacitance: 47e-6, esr: 3e-3 }],
  switch: { onResistance: 12e-3 },
  rectifier: { kind: 'synchronous', onResistance: 8e-3 },
  modulator: { kind: 'voltage-mode', rampAmplitude: 1.5 },
}

/** 5 V to 24 V, 250 mA sensor supply at 400 kHz in peak current mode. */
export const sensorBoost: DesignDocumentInput = {
  topology: 'boost',
  switchingFrequency: 400e3,
  line: { minimum: 4.5, nominal: 5, maximum: 5.5 },
  output: { voltage: 24, currentMinimum: 0.02, currentMaximum: 0.25 },
  inductor: { inductance: 10e-6, resistance: 30e-3 },
  outputCapacitors: [{ count: 2, capacitance: 10e-6, esr: 3e-3 }],
  switch: { onResistance: 50e-3 },
  rectifier: { kind: 'diode', onResistance: 20e-3, forwardVoltage: 0.4 },
  modulator: { kind: 'peak-current-mode', currentSenseResistance: 0.05, slopeCompensation: 100e3 },
  amplifier: { kind: 'transconductance', transconductance: 1e-3 },
}

import type { DesignDocumentInput } from '@/converters/document'

/** 12 V to 3.3 V, 8 A, 500 kHz, voltage mode, with a type III network. */
export function buckDesign(overrides: Partial<DesignDocumentInput> = {}): DesignDocumentInput {
  return {
    topology: 'buck',
    switchingFrequency: 500e3,
    line: { minimum: 9, nominal: 12, maximum: 15 },
    output: { voltage: 3.3, currentMinimum: 0.5, currentMaximum: 8 },
    inductor: { inductance: 2.2e-6, resistance: 8e-3 },
    outputCapacitors: [{ count: 4, capacitance: 47e-6, esr: 3e-3 }],
    switch: { onResistance: 12e-3 },
    rectifier: { kind: 'synchronous', onResistance: 8e-3, forwardVoltage: 0 },
    modulator: { kind: 'voltage-mode', rampAmplitude: 1.5 },
    compensator: { type: 'III', parts: { R1: 10e3, R2: 12.1e3, R3: 270, C1: 1.5e-9, C2: 33e-12, C3: 1e-9 } },
    ...overrides,
  }
}

/** 5 V to 24 V, 0.6 A, 300 kHz, peak current mode, with a type II network on a transconductance amplifier. */
export function boostDesign(overrides: Partial<DesignDocumentInput> = {}): DesignDocumentInput {
  return {
    topology: 'boost',
    switchingFrequency: 300e3,
    line: { minimum: 4.5, nominal: 5, maximum: 5.5 },
    output: { voltage: 24, currentMinimum: 0.1, currentMaximum: 0.6 },
    inductor: { inductance: 10e-6, resistance: 20e-3 },
    outputCapacitors: [{ count: 4, capacitance: 10e-6, esr: 4e-3 }],
    switch: { onResistance: 12e-3 },
    rectifier: { kind: 'diode', onResistance: 20e-3, forwardVoltage: 0.4 },
    modulator: { kind: 'peak-current-mode', currentSenseResistance: 0.05, slopeCompensation: 80e3 },
    sense: { referenceVoltage: 1.2, upperResistance: 100e3 },
    amplifier: { kind: 'transconductance', transconductance: 1e-3, outputResistance: 1e6 },
    compensator: { type: 'II', parts: { R2: 4.7e3, C1: 47e-9, C2: 1e-9 } },
    ...overrides,
  }
}

import type { SampleSource } from '@/db/seed/samples/source'

/**
 * Ripple at nominal line: 5 V·0.79/(10 µH·400 kHz) ≈ 1 A on 3 A, a third. The inductor's down-slope at the sense
 * resistor is 5 V/10 µH·30 mΩ = 15 kV/s, of which 12 kV/s is four fifths.
 */
export const radioRail: SampleSource = {
  slug: 'telemetry-radio-rail',
  title: 'Telemetry radio rail, 24 V to 5 V',
  summary:
    'Synchronous buck, 3 A at 400 kHz, peak current mode with an op-amp: ceramic and polymer capacitors side by side, ' +
    'a type II network is enough.',
  design: {
    schema: 1,
    name: 'Telemetry radio rail',
    topology: 'buck',
    switchingFrequency: 400e3,
    line: { minimum: 18, nominal: 24, maximum: 32 },
    output: { voltage: 5, currentMinimum: 0.2, currentMaximum: 3 },
    inductor: { inductance: 10e-6, resistance: 22e-3 },
    outputCapacitors: [
      { count: 2, capacitance: 22e-6, esr: 3e-3 },
      { count: 1, capacitance: 150e-6, esr: 18e-3 },
    ],
    switch: { onResistance: 35e-3 },
    rectifier: { kind: 'synchronous', onResistance: 22e-3 },
    modulator: { kind: 'peak-current-mode', currentSenseResistance: 30e-3, slopeCompensation: 12e3 },
    sense: { referenceVoltage: 0.8, upperResistance: 52.3e3 },
    amplifier: { kind: 'op-amp', gainBandwidth: 5e6, openLoopGain: 1e4 },
  },
}

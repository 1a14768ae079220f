import type { SampleSource } from '@/db/seed/samples/source'

/**
 * At full load K = 2L/(R·T) ≈ 0.015 against a critical value of D·D′² ≈ 0.074, so conduction is discontinuous over
 * the whole range of line and load.
 */
export const echoBias: SampleSource = {
  slug: 'echo-sounder-bias',
  title: 'Echo sounder bias, 5 V to 15 V',
  summary:
    'Boost, 80 mA at 300 kHz with a small inductor, voltage mode: always in discontinuous conduction, where the ' +
    'stage behaves like a single slow pole.',
  design: {
    schema: 1,
    name: 'Echo sounder bias',
    topology: 'boost',
    switchingFrequency: 300e3,
    line: { minimum: 4.5, nominal: 5, maximum: 5.5 },
    output: { voltage: 15, currentMinimum: 0.01, currentMaximum: 0.08 },
    inductor: { inductance: 4.7e-6, resistance: 40e-3 },
    outputCapacitors: [{ count: 2, capacitance: 4.7e-6, esr: 6e-3 }],
    switch: { onResistance: 80e-3 },
    rectifier: { kind: 'diode', onResistance: 0.15, forwardVoltage: 0.4 },
    modulator: { kind: 'voltage-mode', rampAmplitude: 1.2 },
    sense: { referenceVoltage: 1.2, upperResistance: 100e3 },
    amplifier: { kind: 'op-amp', gainBandwidth: 3e6, openLoopGain: 1e4 },
  },
}

import type { SampleSource } from '@/db/seed/samples/source'

/**
 * Ripple at nominal line: 5 V·0.79/(12 µH·350 kHz) ≈ 0.94 A on 2.9 A, a third. The inductor's down-slope at the sense
 * resistor is (24.5 − 4.5) V/12 µH·25 mΩ ≈ 42 kV/s at low line, so 30 kV/s is well over the half that stability asks.
 */
export const sensorBoost: SampleSource = {
  slug: 'sensor-boost',
  title: 'Sensor boost, 5 V to 24 V',
  summary:
    'Boost, 0.6 A at 350 kHz, peak current mode with a transconductance amplifier: the right-half-plane zero at low ' +
    'line and full load sets the ceiling on the crossover.',
  design: {
    schema: 1,
    name: 'Sensor boost',
    topology: 'boost',
    switchingFrequency: 350e3,
    line: { minimum: 4.5, nominal: 5, maximum: 5.5 },
    output: { voltage: 24, currentMinimum: 0.05, currentMaximum: 0.6 },
    inductor: { inductance: 12e-6, resistance: 25e-3 },
    outputCapacitors: [{ count: 4, capacitance: 5.6e-6, esr: 4e-3 }],
    switch: { onResistance: 30e-3 },
    rectifier: { kind: 'diode', onResistance: 60e-3, forwardVoltage: 0.4 },
    modulator: { kind: 'peak-current-mode', currentSenseResistance: 25e-3, slopeCompensation: 30e3 },
    sense: { referenceVoltage: 1.2, upperResistance: 100e3 },
    amplifier: { kind: 'transconductance', transconductance: 1e-3, outputResistance: 1e6 },
  },
}

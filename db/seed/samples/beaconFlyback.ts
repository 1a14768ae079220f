import type { SampleSource } from '@/db/seed/samples/source'

/**
 * Duty cycle at nominal line: 12.45/(12.45 + 24·0.5) ≈ 0.51. Ripple in the magnetising inductance: 24 V·0.51/(82 µH·150
 * kHz) ≈ 1 A on 1.5 A·0.5/0.49 ≈ 1.5 A. Its sensed down-slope is 12.45 V/0.5/82 µH·0.15 Ω ≈ 46 kV/s; 30 kV/s is well
 * over the half that stability asks. The LED resistor may be at most 8.3 V/(4.7 V/4.7 kΩ) = 8.3 kΩ.
 */
export const beaconFlyback: SampleSource = {
  slug: 'beacon-flyback',
  title: 'Beacon supply, 24 V to isolated 12 V',
  summary:
    'Flyback, 1.5 A at 150 kHz, peak current mode with a shunt reference and an optocoupler: the optocoupler’s pole ' +
    'and the fast lane through its LED set what the network can do.',
  design: {
    schema: 1,
    name: 'Beacon supply',
    topology: 'flyback',
    switchingFrequency: 150e3,
    line: { minimum: 18, nominal: 24, maximum: 32 },
    output: { voltage: 12, currentMinimum: 0.15, currentMaximum: 1.5 },
    inductor: { inductance: 82e-6, resistance: 70e-3 },
    transformer: { turnsRatio: 0.5 },
    outputCapacitors: [
      { count: 2, capacitance: 270e-6, esr: 22e-3 },
      { count: 1, capacitance: 10e-6, esr: 4e-3 },
    ],
    switch: { onResistance: 55e-3 },
    rectifier: { kind: 'diode', onResistance: 28e-3, forwardVoltage: 0.45 },
    modulator: { kind: 'peak-current-mode', currentSenseResistance: 0.15, slopeCompensation: 30e3 },
    dutyLimit: 0.75,
    sense: { referenceVoltage: 2.5, upperResistance: 38.3e3 },
    amplifier: {
      kind: 'shunt-optocoupler',
      currentTransferRatio: 1,
      pullUpResistance: 4.7e3,
      ledResistance: 2.2e3,
      optocouplerPole: 12e3,
    },
  },
}

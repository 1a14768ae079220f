import type { SampleSource } from '@/db/seed/samples/source'

/**
 * Duty cycle from 0.58 at 9 V to 0.26 at 36 V. Both inductors ripple by 36 V·0.26/(33 µH·350 kHz) ≈ 0.8 A at 36 V, where
 * conduction stays continuous above about 0.6 A; a synchronous rectifier keeps it so below. The sensed down-slope of
 * both together is 12 V·(2/33 µH)·50 mΩ ≈ 36 kV/s; 25 kV/s is well over the half that stability asks.
 */
export const vehicleSepic: SampleSource = {
  slug: 'survey-vehicle-sepic',
  title: 'Survey vehicle rail, 9–36 V to 12 V',
  summary:
    'SEPIC, 2 A at 350 kHz, peak current mode with a transconductance amplifier: the line passes through the output ' +
    'voltage, and a damped input filter stands between vehicle and converter.',
  design: {
    schema: 1,
    name: 'Survey vehicle rail',
    topology: 'sepic',
    switchingFrequency: 350e3,
    line: { minimum: 9, nominal: 13.8, maximum: 36 },
    output: { voltage: 12, currentMinimum: 0.1, currentMaximum: 2 },
    inductor: { inductance: 33e-6, resistance: 35e-3 },
    secondInductor: { inductance: 33e-6, resistance: 35e-3 },
    couplingCapacitor: { capacitance: 22e-6, esr: 4e-3 },
    outputCapacitors: [
      { count: 3, capacitance: 22e-6, esr: 3e-3, biasDerating: 0.35 },
      { count: 1, capacitance: 150e-6, esr: 25e-3 },
    ],
    switch: { onResistance: 22e-3 },
    rectifier: { kind: 'synchronous', onResistance: 18e-3 },
    modulator: { kind: 'peak-current-mode', currentSenseResistance: 50e-3, slopeCompensation: 25e3 },
    inputFilter: {
      inductance: 0.47e-6,
      resistance: 6e-3,
      capacitance: 47e-6,
      esr: 3e-3,
      dampingCapacitance: 330e-6,
      dampingResistance: 0.06,
    },
    sense: { referenceVoltage: 1.2, upperResistance: 91e3 },
    amplifier: { kind: 'transconductance', transconductance: 0.8e-3, outputResistance: 2e6 },
  },
}

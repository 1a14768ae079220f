import type { SampleSource } from '@/db/seed/samples/source'

export const logicRail: SampleSource = {
  slug: 'logger-logic-rail',
  title: 'Logger logic rail, 12 V to 3.3 V',
  summary:
    'Synchronous buck, 8 A at 500 kHz, voltage mode with an op-amp: ceramic capacitors leave the resonance lightly ' +
    'damped, so the loop wants a type III network.',
  design: {
    schema: 1,
    name: 'Logger logic rail',
    topology: 'buck',
    switchingFrequency: 500e3,
    line: { minimum: 9, nominal: 12, maximum: 15 },
    output: { voltage: 3.3, currentMinimum: 0.5, currentMaximum: 8 },
    inductor: { inductance: 2.2e-6, resistance: 8e-3 },
    outputCapacitors: [{ count: 4, capacitance: 47e-6, esr: 3e-3 }],
    switch: { onResistance: 12e-3 },
    rectifier: { kind: 'synchronous', onResistance: 8e-3 },
    modulator: { kind: 'voltage-mode', rampAmplitude: 1.5 },
    sense: { referenceVoltage: 0.8, upperResistance: 10e3 },
    amplifier: { kind: 'op-amp', gainBandwidth: 10e6, openLoopGain: 1e4 },
  },
}

/** Designs of every kind that the spread is asked about, each with a network that closes its loop. */
import type { DesignDocumentInput } from '@/converters/document'
import { boostDesign, buckDesign } from '@/tests/support/designs'

export const SPREAD_DESIGNS: Readonly<Record<string, DesignDocumentInput>> = {
  'buck, voltage mode': buckDesign(),
  'buck, voltage mode, ceramic and bulk banks': buckDesign({
    outputCapacitors: [
      { count: 4, capacitance: 47e-6, esr: 3e-3, biasDerating: 0.3 },
      { count: 2, capacitance: 220e-6, esr: 15e-3 },
    ],
  }),
  'buck, voltage mode, ideal capacitor, constant current': buckDesign({
    outputCapacitors: [{ count: 4, capacitance: 47e-6 }],
    load: 'constant-current',
  }),
  'buck, peak current mode': buckDesign({
    modulator: { kind: 'peak-current-mode', currentSenseResistance: 0.05, slopeCompensation: 60e3 },
    compensator: { type: 'II', parts: { R1: 10e3, R2: 15e3, C1: 2.2e-9, C2: 47e-12 } },
    load: 'constant-power',
  }),
  'boost, peak current mode, from full to light load': boostDesign(),
  'boost, voltage mode, discontinuous': boostDesign({
    output: { voltage: 24, currentMinimum: 0.01, currentMaximum: 0.03 },
    modulator: { kind: 'voltage-mode', rampAmplitude: 1.5 },
    compensator: { type: 'II', parts: { R2: 2.2e3, C1: 100e-9, C2: 1e-9 } },
  }),
  'boost, peak current mode, discontinuous': boostDesign({
    output: { voltage: 24, currentMinimum: 0.01, currentMaximum: 0.03 },
  }),
  'buck-boost, voltage mode': {
    ...buckDesign({
      topology: 'buck-boost',
      line: { minimum: 10, nominal: 12, maximum: 14 },
      output: { voltage: 12, currentMinimum: 0.8, currentMaximum: 2 },
      inductor: { inductance: 22e-6, resistance: 20e-3 },
      outputCapacitors: [{ count: 4, capacitance: 47e-6, esr: 5e-3 }],
      switchingFrequency: 300e3,
    }),
    compensator: { type: 'III', parts: { R1: 10e3, R2: 2.2e3, R3: 1e3, C1: 100e-9, C2: 2.2e-9, C3: 10e-9 } },
  },
  'sepic, peak current mode': {
    ...boostDesign({
      topology: 'sepic',
      line: { minimum: 9, nominal: 12, maximum: 18 },
      output: { voltage: 12, currentMinimum: 0.8, currentMaximum: 1.5 },
      inductor: { inductance: 22e-6, resistance: 30e-3 },
      secondInductor: { inductance: 22e-6, resistance: 30e-3 },
      couplingCapacitor: { capacitance: 10e-6, esr: 10e-3 },
      modulator: { kind: 'peak-current-mode', currentSenseResistance: 0.03, slopeCompensation: 60e3 },
      compensator: { type: 'II', parts: { R2: 1e3, C1: 220e-9, C2: 2.2e-9 } },
    }),
  },
}

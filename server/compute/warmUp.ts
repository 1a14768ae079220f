import { DesignDocument } from '@/converters/document'
import type { TaskRequest } from '@/server/compute/messages'

/** A small analysis that makes a thread load the engine before the first visitor needs it. */
export const warmUpRequest: TaskRequest = {
  task: 'analysis',
  input: {
    design: DesignDocument.parse({
      topology: 'buck',
      switchingFrequency: 500e3,
      line: { minimum: 9, nominal: 12, maximum: 15 },
      output: { voltage: 3.3, currentMinimum: 0.5, currentMaximum: 8 },
      inductor: { inductance: 2.2e-6, resistance: 8e-3 },
      outputCapacitors: [{ count: 4, capacitance: 47e-6, esr: 3e-3 }],
      rectifier: { kind: 'synchronous' },
      modulator: { kind: 'voltage-mode', rampAmplitude: 1.5 },
    }),
    frequencies: [1e3, 1e4, 1e5],
  },
}

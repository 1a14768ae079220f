/**
 * SEPIC: line, first inductor, node x; switch from x to ground; coupling capacitor from x to z; second inductor from z to
 * ground; rectifier from z to the output.
 */
import { GROUND } from '../network'
import {
  couplingCapacitorBetween,
  inductorBetween,
  POSITIVE_OUTPUT,
  rectifierBetween,
  secondInductorBetween,
  switchBetween,
} from './elements'
import { coupledForms } from './forms'
import type { TopologyDefinition } from './topology'

export const sepic: TopologyDefinition = {
  always: (design) => [
    inductorBetween(design, 'line', 'x'),
    couplingCapacitorBetween(design, 'x', 'z'),
    secondInductorBetween(design, 'z', GROUND),
  ],
  on: (design) => [switchBetween(design, 'x', GROUND)],
  off: (design) => [rectifierBetween(design, 'z', 'output')],
  output: POSITIVE_OUTPUT,
  inductors: ['inductor', 'secondInductor'],
  capacitors: ['couplingCapacitor'],
  stress: {
    switch: { kind: 'voltage', from: 'x', to: GROUND },
    rectifier: { kind: 'voltage', from: 'output', to: 'z' },
  },
  closedForms: { continuous: coupledForms, discontinuous: null },
}

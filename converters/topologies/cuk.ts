/**
 * Ćuk: line, first inductor, node x; switch from x to ground; coupling capacitor from x to z; rectifier from z to ground;
 * second inductor from z to the negative output.
 */
import { GROUND } from '../network'
import {
  couplingCapacitorBetween,
  inductorBetween,
  NEGATIVE_OUTPUT,
  rectifierBetween,
  secondInductorBetween,
  switchBetween,
} from './elements'
import { coupledForms } from './forms'
import type { TopologyDefinition } from './topology'

export const cuk: TopologyDefinition = {
  always: (design) => [
    inductorBetween(design, 'line', 'x'),
    couplingCapacitorBetween(design, 'x', 'z'),
    secondInductorBetween(design, 'z', 'output'),
  ],
  on: (design) => [switchBetween(design, 'x', GROUND)],
  off: (design) => [rectifierBetween(design, 'z', GROUND)],
  output: NEGATIVE_OUTPUT,
  inductors: ['inductor', 'secondInductor'],
  capacitors: ['couplingCapacitor'],
  stress: {
    switch: { kind: 'voltage', from: 'x', to: GROUND },
    rectifier: { kind: 'voltage', from: GROUND, to: 'z' },
  },
  closedForms: { continuous: coupledForms, discontinuous: null },
}

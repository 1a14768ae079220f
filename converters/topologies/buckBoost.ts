/** Inverting buck-boost: line, switch, node x; inductor from x to ground; rectifier from the negative output to x. */
import { GROUND } from '../network'
import { inductorBetween, NEGATIVE_OUTPUT, rectifierBetween, switchBetween } from './elements'
import { buckBoostDiscontinuousForms, buckBoostForms } from './forms'
import type { TopologyDefinition } from './topology'

export const buckBoost: TopologyDefinition = {
  always: (design) => [inductorBetween(design, 'x', GROUND)],
  on: (design) => [switchBetween(design, 'line', 'x')],
  off: (design) => [rectifierBetween(design, 'output', 'x')],
  output: NEGATIVE_OUTPUT,
  inductors: ['inductor'],
  capacitors: [],
  stress: {
    switch: { kind: 'voltage', from: 'line', to: 'x' },
    rectifier: { kind: 'voltage', from: 'x', to: 'output' },
  },
  closedForms: {
    continuous: (point, dutyCycle) => buckBoostForms(point, dutyCycle),
    discontinuous: (point) => buckBoostDiscontinuousForms(point),
  },
}

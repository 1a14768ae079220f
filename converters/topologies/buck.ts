/** Buck: line, switch, node x; rectifier from ground to x; inductor from x to the output. */
import { GROUND } from '../network'
import { inductorBetween, POSITIVE_OUTPUT, rectifierBetween, switchBetween } from './elements'
import { buckDiscontinuousForms, buckForms } from './forms'
import type { TopologyDefinition } from './topology'

export const buck: TopologyDefinition = {
  always: (design) => [inductorBetween(design, 'x', 'output')],
  on: (design) => [switchBetween(design, 'line', 'x')],
  off: (design) => [rectifierBetween(design, GROUND, 'x')],
  output: POSITIVE_OUTPUT,
  inductors: ['inductor'],
  capacitors: [],
  stress: {
    switch: { kind: 'voltage', from: 'line', to: 'x' },
    rectifier: { kind: 'voltage', from: 'x', to: GROUND },
  },
  closedForms: {
    continuous: (point, dutyCycle) => buckForms(point, dutyCycle),
    discontinuous: (point) => buckDiscontinuousForms(point),
  },
}

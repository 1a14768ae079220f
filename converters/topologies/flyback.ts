/**
 * Flyback: the magnetising inductance with its resistance from the line to node x, the switch from x to ground; an ideal
 * transformer across it whose secondary, reversed, feeds the rectifier and the output.
 */
import { GROUND } from '../network'
import { inductorBetween, POSITIVE_OUTPUT, rectifierBetween, switchBetween, turnsRatioOf } from './elements'
import { buckBoostDiscontinuousForms, buckBoostForms } from './forms'
import type { TopologyDefinition } from './topology'

export const flyback: TopologyDefinition = {
  always: (design) => [
    inductorBetween(design, 'line', 'x'),
    {
      kind: 'transformer',
      primary: { from: 'line', to: 'x' },
      secondary: { from: GROUND, to: 'secondary' },
      ratio: turnsRatioOf(design),
    },
  ],
  on: (design) => [switchBetween(design, 'x', GROUND)],
  off: (design) => [rectifierBetween(design, 'secondary', 'output')],
  output: POSITIVE_OUTPUT,
  inductors: ['inductor'],
  capacitors: [],
  stress: {
    switch: { kind: 'voltage', from: 'x', to: GROUND },
    rectifier: { kind: 'voltage', from: 'output', to: 'secondary' },
  },
  closedForms: {
    continuous: (point, dutyCycle) => buckBoostForms(point, dutyCycle, turnsRatioOf(point.design)),
    discontinuous: (point) => buckBoostDiscontinuousForms(point, turnsRatioOf(point.design)),
  },
}

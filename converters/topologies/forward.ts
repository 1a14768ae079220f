/**
 * Forward: the switch feeds an ideal transformer; its secondary goes through the forward rectifier to node x, from where
 * on it is a buck. The rectifier's figures serve both the forward and the freewheeling path. How the core is reset is
 * not part of the document, and with it the voltage across the open switch.
 */
import { GROUND } from '../network'
import { inductorBetween, POSITIVE_OUTPUT, rectifierBetween, switchBetween, turnsRatioOf } from './elements'
import { buckDiscontinuousForms, buckForms } from './forms'
import type { TopologyDefinition } from './topology'

export const forward: TopologyDefinition = {
  always: (design) => [inductorBetween(design, 'x', 'output')],
  on: (design) => [
    switchBetween(design, 'line', 'primary'),
    {
      kind: 'transformer',
      primary: { from: 'primary', to: GROUND },
      secondary: { from: 'secondary', to: GROUND },
      ratio: turnsRatioOf(design),
    },
    rectifierBetween(design, 'secondary', 'x', 'forwardRectifier'),
  ],
  off: (design) => [rectifierBetween(design, GROUND, 'x')],
  output: POSITIVE_OUTPUT,
  inductors: ['inductor'],
  capacitors: [],
  stress: { switch: null, rectifier: { kind: 'voltage', from: 'x', to: GROUND } },
  closedForms: {
    continuous: (point, dutyCycle) => buckForms(point, dutyCycle, turnsRatioOf(point.design)),
    discontinuous: (point) => buckDiscontinuousForms(point, turnsRatioOf(point.design)),
  },
}

/** Buck: line, switch, node x; rectifier from ground to x; inductor from x to the output. */
import { GROUND } from '../network'
import { inductorBetween, rectifierBetween, switchBetween, totalCapacitance } from './elements'
import type { TopologyDefinition } from './topology'

export const buck: TopologyDefinition = {
  always: (design) => [inductorBetween(design, 'x', 'output')],
  on: (design) => [switchBetween(design, 'line', 'x')],
  off: (design) => [rectifierBetween(design, GROUND, 'x')],
  output: { positive: 'output', negative: GROUND },
  inductors: ['inductor'],
  capacitors: [],
  stress: {
    switch: { kind: 'voltage', from: 'line', to: 'x' },
    rectifier: { kind: 'voltage', from: 'x', to: GROUND },
  },
  closedForms: {
    continuous: ({ design, outputCurrent }, dutyCycle) => {
      const L = design.inductor.inductance
      const C = totalCapacitance(design)
      const R = design.output.voltage / outputCurrent
      return {
        controlGain: design.output.voltage / dutyCycle,
        controlGainEquation: 'V/D',
        lineGain: dutyCycle,
        lineGainEquation: 'D',
        resonance: 1 / Math.sqrt(L * C),
        resonanceEquation: '1/√(LC)',
        quality: R * Math.sqrt(C / L),
        qualityEquation: 'R√(C/L)',
        rightHalfPlaneZero: null,
        rightHalfPlaneZeroEquation: '',
      }
    },
    discontinuous: ({ design, lineVoltage, outputCurrent }) => {
      const V = design.output.voltage
      const R = V / outputCurrent
      const M = V / lineVoltage
      const K = (2 * design.inductor.inductance * design.switchingFrequency) / R
      const D = M * Math.sqrt(K / (1 - M))
      return {
        controlGain: ((2 * V) / D) * ((1 - M) / (2 - M)),
        controlGainEquation: '(2V/D)·(1 − M)/(2 − M)',
        lineGain: M,
        pole: (2 - M) / ((1 - M) * R * totalCapacitance(design)),
        poleEquation: '(2 − M)/((1 − M)RC)',
      }
    },
  },
}

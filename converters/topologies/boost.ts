/** Boost: line, inductor, node x; switch from x to ground; rectifier from x to the output. */
import { GROUND } from '../network'
import { inductorBetween, rectifierBetween, switchBetween, totalCapacitance } from './elements'
import type { TopologyDefinition } from './topology'

export const boost: TopologyDefinition = {
  always: (design) => [inductorBetween(design, 'line', 'x')],
  on: (design) => [switchBetween(design, 'x', GROUND)],
  off: (design) => [rectifierBetween(design, 'x', 'output')],
  output: { positive: 'output', negative: GROUND },
  inductors: ['inductor'],
  capacitors: [],
  stress: {
    switch: { kind: 'voltage', from: 'x', to: GROUND },
    rectifier: { kind: 'voltage', from: 'output', to: 'x' },
  },
  closedForms: {
    continuous: ({ design, outputCurrent }, dutyCycle) => {
      const off = 1 - dutyCycle
      const V = design.output.voltage
      const L = design.inductor.inductance
      const C = totalCapacitance(design)
      const R = V / outputCurrent
      return {
        controlGain: V / off,
        controlGainEquation: 'V/D′',
        lineGain: 1 / off,
        lineGainEquation: '1/D′',
        resonance: off / Math.sqrt(L * C),
        resonanceEquation: 'D′/√(LC)',
        quality: off * R * Math.sqrt(C / L),
        qualityEquation: 'D′R√(C/L)',
        rightHalfPlaneZero: (off * off * R) / L,
        rightHalfPlaneZeroEquation: 'D′²R/L',
      }
    },
    discontinuous: ({ design, lineVoltage, outputCurrent }) => {
      const V = design.output.voltage
      const R = V / outputCurrent
      const M = V / lineVoltage
      const K = (2 * design.inductor.inductance * design.switchingFrequency) / R
      const D = Math.sqrt(K * M * (M - 1))
      return {
        controlGain: ((2 * V) / D) * ((M - 1) / (2 * M - 1)),
        controlGainEquation: '(2V/D)·(M − 1)/(2M − 1)',
        lineGain: M,
        pole: (2 * M - 1) / ((M - 1) * R * totalCapacitance(design)),
        poleEquation: '(2M − 1)/((M − 1)RC)',
      }
    },
  },
}

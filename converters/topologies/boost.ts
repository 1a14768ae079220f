/** Boost: line, inductor, node x; switch from x to ground; rectifier from x to the output. */
import { GROUND } from '../network'
import { inductorBetween, letters, POSITIVE_OUTPUT, rectifierBetween, switchBetween } from './elements'
import type { TopologyDefinition } from './topology'

export const boost: TopologyDefinition = {
  always: (design) => [inductorBetween(design, 'line', 'x')],
  on: (design) => [switchBetween(design, 'x', GROUND)],
  off: (design) => [rectifierBetween(design, 'x', 'output')],
  output: POSITIVE_OUTPUT,
  inductors: ['inductor'],
  capacitors: [],
  stress: {
    switch: { kind: 'voltage', from: 'x', to: GROUND },
    rectifier: { kind: 'voltage', from: 'output', to: 'x' },
  },
  closedForms: {
    continuous: (point, dutyCycle) => {
      const off = 1 - dutyCycle
      const { L, C, V, R } = letters(point)
      return {
        controlGain: { value: V / off, equation: 'V/D′' },
        lineGain: { value: 1 / off, equation: '1/D′' },
        filter: {
          resonance: { value: off / Math.sqrt(L * C), equation: 'D′/√(LC)' },
          quality: { value: off * R * Math.sqrt(C / L), equation: 'D′R√(C/L)' },
        },
        rightHalfPlaneZero: { value: (off * off * R) / L, equation: 'D′²R/L' },
      }
    },
    discontinuous: (point) => {
      const { L, C, V, R, M, switchingFrequency } = letters(point)
      const D = Math.sqrt(((2 * L * switchingFrequency) / R) * M * (M - 1))
      return {
        controlGain: { value: ((2 * V) / D) * ((M - 1) / (2 * M - 1)), equation: '(2V/D)·(M − 1)/(2M − 1)' },
        lineGain: { value: M, equation: 'M' },
        pole: { value: (2 * M - 1) / ((M - 1) * R * C), equation: '(2M − 1)/((M − 1)RC)' },
      }
    },
  },
}

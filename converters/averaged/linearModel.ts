/** A linear small-signal model of the plant, and its evaluation. */
import type { Complex } from '../numeric/complex'
import { invertComplex } from '../numeric/complexInverse'
import { flatten } from '../numeric/linearSystem'
import type { SwitchedResponses } from '../switched/response'

/** Columns of B and D: control voltage (V), line voltage (V), current drawn at the output (A). Output: v_out (V). */
export const CONTROL = 0
export const LINE = 1
export const LOAD = 2

export interface LinearModel {
  readonly A: number[][] // n × n
  readonly B: number[][] // n × 3
  readonly C: number[] // n
  readonly D: number[] // 3
}

export const column = (matrix: readonly (readonly number[])[], j: number): number[] => matrix.map((row) => row[j]!)

/** C·(jω − A)⁻¹·B + D as functions of ω in rad/s; same signs as the switched responses. */
export function modelResponses({ A, B, C, D }: LinearModel): (omega: number) => SwitchedResponses {
  const n = A.length
  const flat = flatten(A)
  const re = new Float64Array(n * n)
  const im = new Float64Array(n * n)
  const order = new Int32Array(n)
  return function respond(omega: number): SwitchedResponses {
    for (let i = 0; i < n * n; i++) {
      re[i] = -flat[i]!
      im[i] = 0
    }
    for (let i = 0; i < n; i++) im[i * n + i] = omega
    if (!invertComplex(re, im, n, order)) return respond(omega * (1 + 1e-9))
    const answers: Complex[] = [CONTROL, LINE, LOAD].map((input) => {
      let sumRe = D[input]!
      let sumIm = 0
      for (let j = 0; j < n; j++) {
        const b = B[j]![input]!
        if (b === 0) continue
        for (let i = 0; i < n; i++) {
          sumRe += C[i]! * re[i * n + j]! * b
          sumIm += C[i]! * im[i * n + j]! * b
        }
      }
      return { re: sumRe, im: sumIm }
    })
    const load = answers[LOAD]!
    return {
      controlToOutput: answers[CONTROL]!,
      lineToOutput: answers[LINE]!,
      outputImpedance: { re: -load.re, im: -load.im },
    }
  }
}

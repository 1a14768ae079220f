/**
 * Duty at which the averaged circuit gives the wanted output, by Newton's method on flat arrays: this runs for every
 * sample of a statistical run. With M = D·A₁ + D′·A₂ the rest point solves M·x = −b and its change with duty
 * M·x′ = −E, E = (A₁ − A₂)·x + (B₁ − B₂)·u.
 * Source: Middlebrook and Ćuk, "A general unified approach to modelling switching-converter power stages", PESC 1976.
 */
import { MEASURES, type Circuit, type Interval } from '../circuit'
import { solveReal } from '../numeric/linearSystem'
import { dot } from '../switched/flow'

/** Share of the wanted output within which it must be met. */
const MET = 1e-10
const MOST_STEPS = 12

/**
 * @param guess - duty cycle of a circuit like this one.
 * @returns null where the way from there leads over the duty limit or off the branch on which the output rises with duty.
 */
export function dutyNear(circuit: Circuit, guess: number): number | null {
  const { on, off, inputs, design } = circuit
  const n = on.A.length
  const wanted = design.output.voltage
  const driveOn = drive(on, inputs)
  const driveOff = drive(off, inputs)
  const outputOn = on.C[MEASURES.outputVoltage]!
  const outputOff = off.C[MEASURES.outputVoltage]!
  const throughOn = dot(on.D[MEASURES.outputVoltage]!, inputs)
  const throughOff = dot(off.D[MEASURES.outputVoltage]!, inputs)
  const matrix = new Float64Array(n * n)
  const rest = new Float64Array(n)
  const moved = new Float64Array(n)
  let duty = guess
  for (let step = 0; step < MOST_STEPS; step++) {
    blendInto(matrix, on.A, off.A, duty)
    for (let i = 0; i < n; i++) rest[i] = -duty * driveOn[i]! - (1 - duty) * driveOff[i]!
    if (!solveReal(matrix, n, rest, 1)) return null
    const withOn = dot(outputOn, rest) + throughOn
    const withOff = dot(outputOff, rest) + throughOff
    const error = duty * withOn + (1 - duty) * withOff - wanted
    if (Math.abs(error) <= MET * wanted) return duty
    blendInto(matrix, on.A, off.A, duty)
    for (let i = 0; i < n; i++) moved[i] = dot(off.A[i]!, rest) + driveOff[i]! - dot(on.A[i]!, rest) - driveOn[i]!
    if (!solveReal(matrix, n, moved, 1)) return null
    const slope = withOn - withOff + duty * dot(outputOn, moved) + (1 - duty) * dot(outputOff, moved)
    if (!(slope > 0)) return null
    duty -= error / slope
    if (!(duty > 0 && duty <= design.dutyLimit)) return null
  }
  return null
}

/** D·A₁ + (1 − D)·A₂, row-major. */
function blendInto(
  matrix: Float64Array,
  on: readonly (readonly number[])[],
  off: readonly (readonly number[])[],
  duty: number,
): void {
  const n = on.length
  for (let i = 0; i < n; i++) {
    const first = on[i]!
    const second = off[i]!
    for (let j = 0; j < n; j++) matrix[i * n + j] = duty * first[j]! + (1 - duty) * second[j]!
  }
}

function drive({ B }: Interval, inputs: readonly number[]): Float64Array {
  const sums = new Float64Array(B.length)
  for (let i = 0; i < B.length; i++) sums[i] = dot(B[i]!, inputs)
  return sums
}

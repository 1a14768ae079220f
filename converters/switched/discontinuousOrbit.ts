/**
 * The orbit in discontinuous conduction. The unknowns are the capacitor voltages at the start of the period and the
 * times that switch and rectifier conduct; the equations, that every voltage returns, that the rectifier stops at zero
 * current and that the mean output is the wanted one. Newton with exact derivatives, from the triangle that ideal parts
 * would give.
 */
import { MEASURES, roughState, type Circuit, type Interval } from '../circuit'
import { solveReal } from '../numeric/linearSystem'
import { advance, derivative, dot, flowOf, outputIntegral, read, type Flow } from './flow'
import type { Orbit } from './orbit'

/** Scaled residual that counts as met, and the most steps to get there. */
const MET = 1e-12
const GOOD_ENOUGH = 1e-9
const MOST_STEPS = 40

interface Cycle {
  readonly durations: readonly [number, number, number]
  readonly flows: readonly [Flow, Flow, Flow]
  /** State at the start, at turn-off, where the rectifier stops (before and after its current is set to zero), at the end. */
  readonly start: Float64Array
  readonly turnOff: Float64Array
  readonly stop: Float64Array
  readonly rest: Float64Array
  readonly end: Float64Array
}

/** Null if there is none that Newton can reach. */
export function findDiscontinuousOrbit(circuit: Circuit): Orbit | null {
  const { period, design, stoppingState } = circuit
  const voltages = circuit.states.map((_, i) => i).filter((i) => i !== stoppingState)
  const first = triangle(circuit)
  if (!first) return null
  let { start, on, off } = first
  let best = Infinity
  for (let step = 0; step < MOST_STEPS; step++) {
    if (!(on > 0 && off > 0 && on + off <= period && on <= design.dutyLimit * period)) return null
    const cycle = runCycle(circuit, start, on, off)
    const { matrix, residual } = linearise(circuit, cycle, voltages)
    const size = residual.reduce((most, value) => Math.max(most, Math.abs(value)), 0)
    // Round-off ends the convergence somewhere below "met" or a little above it.
    if (size <= MET || (size <= GOOD_ENOUGH && size >= best)) return orbitOf(circuit, cycle)
    best = size
    const n = residual.length
    if (!solveReal(matrix, n, residual, 1)) return null
    const change = residual
    // Half of the present times is the longest step: farther out the cycle is another one.
    const longest = Math.max(Math.abs(change[n - 2]! / (on / period)), Math.abs(change[n - 1]! / (off / period)))
    const damping = Math.min(1, 0.5 / longest)
    start = Float64Array.from(start)
    voltages.forEach((state, k) => (start[state]! -= change[k]! * damping * design.output.voltage))
    on -= change[n - 2]! * damping * period
    off -= change[n - 1]! * damping * period
  }
  return null
}

/** Triangular inductor current between constant voltages; null where the current does not rise and fall. */
function triangle(circuit: Circuit): { start: Float64Array; on: number; off: number } | null {
  const { on, off, stoppingState, inputs, period } = circuit
  const start = roughState(circuit)
  const rise = derivative(on, start, inputs)[stoppingState]!
  const fall = -derivative(off, start, inputs)[stoppingState]!
  if (!(rise > 0 && fall > 0)) return null
  const delivered = (interval: Interval) =>
    interval.C.slice(MEASURES.firstBank).reduce((sum, row) => sum + row[stoppingState]!, 0)
  const share = delivered(on) + (delivered(off) * rise) / fall
  const duty = Math.sqrt((2 * circuit.outputCurrent) / (rise * period * share))
  // Near the boundary the triangles would touch or overlap; start just inside.
  const together = duty * (1 + rise / fall)
  const scale = Math.min(1, 0.98 / together) * period
  return { start, on: duty * scale, off: (duty * scale * rise) / fall }
}

function runCycle(circuit: Circuit, start: Float64Array, on: number, off: number): Cycle {
  const { inputs, period, stoppingState } = circuit
  const durations = [on, off, period - on - off] as const
  const flows = [
    flowOf(circuit.on, inputs, durations[0]),
    flowOf(circuit.off, inputs, durations[1]),
    flowOf(circuit.idle, inputs, durations[2]),
  ] as const
  const turnOff = advance(flows[0], start)
  const stop = advance(flows[1], turnOff)
  const rest = Float64Array.from(stop)
  rest[stoppingState] = 0
  return { durations, flows, start, turnOff, stop, rest, end: advance(flows[2], rest) }
}

/**
 * Residuals and their derivatives, scaled: voltages by the output, times by the period, the rectifier's current by its
 * value at turn-off.
 */
function linearise(circuit: Circuit, cycle: Cycle, voltages: readonly number[]) {
  const { inputs, period, stoppingState, design } = circuit
  const { flows, start, turnOff, stop, rest, end } = cycle
  const wanted = design.output.voltage
  const n = voltages.length + 2
  const current = (x: ArrayLike<number>) => read(circuit.off, MEASURES.rectifierCurrent, x, inputs)
  const currentRow = circuit.off.C[MEASURES.rectifierCurrent]!
  const currentScale = Math.abs(current(turnOff)) || 1
  const mean =
    (outputIntegral(flows[0], start) + outputIntegral(flows[1], turnOff) + outputIntegral(flows[2], rest)) / period
  const outputs = [
    read(circuit.on, MEASURES.outputVoltage, turnOff, inputs),
    read(circuit.off, MEASURES.outputVoltage, stop, inputs),
    read(circuit.idle, MEASURES.outputVoltage, end, inputs),
  ] as const
  const slopes = [
    derivative(circuit.on, turnOff, inputs),
    derivative(circuit.off, stop, inputs),
    derivative(circuit.idle, end, inputs),
  ] as const

  const matrix = new Float64Array(n * n)
  const residual = new Float64Array(n)
  /** One column: how a change that arrives as these displacements moves every residual. */
  const fill = (columnIndex: number, scale: number, atStart: Float64Array, on: number, off: number) => {
    const atTurnOff = displaced(flows[0], atStart, slopes[0], on)
    const atStop = displaced(flows[1], atTurnOff, slopes[1], off)
    const atRest = Float64Array.from(atStop)
    atRest[stoppingState] = 0
    const atEnd = displaced(flows[2], atRest, slopes[2], -on - off)
    voltages.forEach((state, k) => (matrix[k * n + columnIndex] = ((atEnd[state]! - atStart[state]!) * scale) / wanted))
    matrix[(n - 2) * n + columnIndex] = (dot(currentRow, atStop) * scale) / currentScale
    const integral =
      dot(flows[0].p, atStart) +
      dot(flows[1].p, atTurnOff) +
      dot(flows[2].p, atRest) +
      outputs[0] * on +
      outputs[1] * off -
      outputs[2] * (on + off)
    matrix[(n - 1) * n + columnIndex] = (integral * scale) / period / wanted
  }
  voltages.forEach((state, k) => {
    const unit = new Float64Array(start.length)
    unit[state] = 1
    fill(k, wanted, unit, 0, 0)
    residual[k] = (end[state]! - start[state]!) / wanted
  })
  const none = new Float64Array(start.length)
  fill(n - 2, period, none, 1, 0)
  fill(n - 1, period, none, 0, 1)
  residual[n - 2] = current(stop) / currentScale
  residual[n - 1] = (mean - wanted) / wanted
  return { matrix, residual }
}

/** E·δ + f·δt: a displacement carried through a flow that also lasts δt longer. */
function displaced({ E }: Flow, by: Float64Array, slope: Float64Array, longer: number): Float64Array {
  const n = by.length
  return Float64Array.from(by, (_, i) => dot(E.subarray(i * n, (i + 1) * n), by) + slope[i]! * longer)
}

function orbitOf(circuit: Circuit, cycle: Cycle): Orbit {
  const { durations, flows, start, turnOff, stop, rest, end } = cycle
  const segment = (k: 0 | 1 | 2, interval: Interval, from: Float64Array, to: Float64Array) => ({
    interval,
    duration: durations[k],
    start: from,
    end: to,
    transition: flows[k].E,
  })
  return {
    conduction: 'discontinuous',
    dutyCycle: durations[0] / circuit.period,
    rectifierDuty: durations[1] / circuit.period,
    segments: [
      segment(0, circuit.on, start, turnOff),
      segment(1, circuit.off, turnOff, stop),
      segment(2, circuit.idle, rest, end),
    ],
  }
}

/**
 * The periodic orbit: the steady state of the switched circuit, with the duty cycle at which the mean of the output
 * voltage over a period is the wanted one.
 */
import { MEASURES, type Circuit, type Interval } from '../circuit'
import { averagedOutput } from '../averaged/equilibrium'
import { DesignError } from '../errors'
import { solveReal } from '../numeric/linearSystem'
import { findRoot } from '../numeric/rootFinding'
import { advance, derivative, flowOf, outputIntegral, read, type Flow } from './flow'

export interface Segment {
  readonly interval: Interval
  readonly duration: number // s
  readonly start: Float64Array
  readonly end: Float64Array
  /** e^(A·duration), n × n. */
  readonly transition: Float64Array
}

export interface Orbit {
  readonly conduction: 'continuous' | 'discontinuous'
  readonly dutyCycle: number
  readonly rectifierDuty: number
  /** On, off and, in discontinuous conduction, idle. */
  readonly segments: readonly Segment[]
}

/** Smallest duty cycle that is looked at: below it a modulator does not work either. */
const SMALLEST_DUTY = 1e-5

/**
 * Finds the orbit. With a diode whose current would have to reverse, the one with discontinuous conduction.
 * @throws DesignError 'unreachable-output' or 'no-operating-point'.
 */
export function findOrbit(circuit: Circuit): Orbit {
  const isDiode = circuit.design.rectifier.kind === 'diode'
  const continuous = findContinuousOrbit(circuit, isDiode)
  if (continuous && !(isDiode && reverses(circuit, continuous))) return continuous
  return findDiscontinuousOrbit(circuit)
}

/** Whether the rectifier's current is negative at the end of its interval. */
function reverses(circuit: Circuit, orbit: Orbit): boolean {
  const off = orbit.segments[1]!
  const current = (x: Float64Array) => read(off.interval, MEASURES.rectifierCurrent, x, circuit.inputs)
  return current(off.end) < 0
}

/** The orbit with the rectifier conducting all through the off time; null if none and `mayFail`. */
export function findContinuousOrbit(circuit: Circuit, mayFail = false): Orbit | null {
  const wanted = circuit.design.output.voltage
  const bracket = bracketDuty(circuit, mayFail)
  if (!bracket) return null
  const error = (duty: number) => meanOutput(circuit, duty) - wanted
  const [low, high] = bracket
  try {
    return continuousOrbit(circuit, findRoot(error, low, high))
  } catch (cause) {
    if (!(cause instanceof RangeError)) throw cause
    if (mayFail) return null
    throw noOrbit(circuit)
  }
}

/**
 * Two duty cycles between which the mean output passes the wanted voltage for the first time. With losses a boost's
 * output rises with duty only up to a point; the branch before that point is the one a controller can hold.
 */
function bracketDuty(circuit: Circuit, mayFail: boolean): [number, number] | null {
  const { design } = circuit
  const wanted = design.output.voltage
  const steps = 24
  let best = -Infinity
  let previous = SMALLEST_DUTY
  for (let k = 0; k <= steps; k++) {
    const duty = SMALLEST_DUTY + ((design.dutyLimit - SMALLEST_DUTY) * k) / steps
    const output = averagedOutput(circuit, duty)
    if (output >= wanted) {
      if (k === 0) {
        if (mayFail) return null
        throw DesignError.at(
          'unreachable-output',
          'output.voltage',
          `A ${design.topology} fed with ${shortNumber(circuit.lineVoltage)} V gives at least ${shortNumber(output)} V; ${shortNumber(wanted)} V lies below that.`,
        )
      }
      // The averaged circuit leaves ripple out, so the orbit's own crossing may lie just beside this interval.
      const [low, high] = [previous, duty]
      const reach = high - low
      return [Math.max(SMALLEST_DUTY, low - reach), Math.min(design.dutyLimit, high + reach)]
    }
    if (Number.isFinite(output)) best = Math.max(best, output)
    previous = duty
  }
  if (mayFail && design.topology !== 'buck') return null
  const limit = Math.round(design.dutyLimit * 1000) / 10
  throw DesignError.at(
    'unreachable-output',
    'output.voltage',
    `A ${design.topology} fed with ${shortNumber(circuit.lineVoltage)} V reaches at most ${shortNumber(best)} V at ${shortNumber(circuit.outputCurrent)} A with a duty cycle up to ${limit} %; ${shortNumber(wanted)} V is asked for.`,
  )
}

/** Mean output voltage of the orbit with a given duty cycle, continuous conduction. */
function meanOutput(circuit: Circuit, duty: number): number {
  const flows = continuousFlows(circuit, duty)
  const start = fixedPoint(flows, [])
  if (!start) throw noOrbit(circuit)
  return (outputIntegral(flows[0]!, start) + outputIntegral(flows[1]!, advance(flows[0]!, start))) / circuit.period
}

const continuousFlows = (circuit: Circuit, duty: number): Flow[] => [
  flowOf(circuit.on, circuit.inputs, duty * circuit.period),
  flowOf(circuit.off, circuit.inputs, (1 - duty) * circuit.period),
]

function continuousOrbit(circuit: Circuit, duty: number): Orbit {
  const flows = continuousFlows(circuit, duty)
  const start = fixedPoint(flows, [])
  if (!start) throw noOrbit(circuit)
  return {
    conduction: 'continuous',
    dutyCycle: duty,
    rectifierDuty: 1 - duty,
    segments: segmentsFrom(
      start,
      [circuit.on, circuit.off],
      flows,
      [duty * circuit.period, (1 - duty) * circuit.period],
      [],
    ),
  }
}

/**
 * Discontinuous conduction: duty and conduction time of the rectifier are found together, such that the rectifier's
 * current is zero when it stops and the mean output is the wanted one. Newton from the triangle that ideal parts would
 * give; where that fails, one search inside the other.
 */
function findDiscontinuousOrbit(circuit: Circuit): Orbit {
  try {
    const [duty, rectifierDuty] = newtonDuties(circuit) ?? nestedDuties(circuit)
    return discontinuousOrbit(circuit, duty, rectifierDuty)
  } catch (cause) {
    if (cause instanceof RangeError) throw noOrbit(circuit)
    throw cause
  }
}

/** Rectifier current at its stop (A) and mean output (V) of the cycle with these duties. */
function discontinuousResidual(circuit: Circuit, duty: number, rectifierDuty: number): [number, number] {
  const { flows, start } = discontinuousCycle(circuit, duty, rectifierDuty)
  const stop = advance(flows[0]!, start)
  const rest = advance(flows[1]!, stop)
  const current = read(circuit.off, MEASURES.rectifierCurrent, rest, circuit.inputs)
  rest[circuit.stoppingState] = 0
  const mean =
    (outputIntegral(flows[0]!, start) + outputIntegral(flows[1]!, stop) + outputIntegral(flows[2]!, rest)) /
    circuit.period
  return [current, mean]
}

function newtonDuties(circuit: Circuit): [number, number] | null {
  const wanted = circuit.design.output.voltage
  let [duty, rectifierDuty] = triangleDuties(circuit)
  for (let step = 0; step < 25; step++) {
    if (!(duty > 0 && rectifierDuty > 0 && duty + rectifierDuty < 1 && duty <= circuit.design.dutyLimit)) return null
    const [current, mean] = discontinuousResidual(circuit, duty, rectifierDuty)
    const nudge = 1e-6
    const [currentD, meanD] = discontinuousResidual(circuit, duty * (1 + nudge), rectifierDuty)
    const [currentR, meanR] = discontinuousResidual(circuit, duty, rectifierDuty * (1 - nudge))
    const a = (currentD - current) / (duty * nudge)
    const b = (current - currentR) / (rectifierDuty * nudge)
    const c = (meanD - mean) / (duty * nudge)
    const d = (mean - meanR) / (rectifierDuty * nudge)
    const determinant = a * d - b * c
    const error = mean - wanted
    let stepD = -(d * current - b * error) / determinant
    let stepR = -(a * error - c * current) / determinant
    // Half of the present value is the longest step: farther out the cycle is another one.
    const damping = Math.min(1, 0.5 / Math.max(Math.abs(stepD / duty), Math.abs(stepR / rectifierDuty)))
    stepD *= damping
    stepR *= damping
    if (!Number.isFinite(stepD) || !Number.isFinite(stepR)) return null
    duty += stepD
    rectifierDuty += stepR
    if (Math.abs(stepD) < 1e-12 * duty && Math.abs(stepR) < 1e-12 * rectifierDuty) return [duty, rectifierDuty]
  }
  return null
}

/** Duties of a triangular inductor current between constant voltages. */
function triangleDuties(circuit: Circuit): [number, number] {
  const { on, off, stoppingState, inputs, design } = circuit
  const x = circuit.states.map((state) => (state.startsWith('output') ? design.output.voltage : 0))
  const rise = derivative(on, x, inputs)[stoppingState]!
  const fall = -derivative(off, x, inputs)[stoppingState]!
  const delivered = (interval: Interval) =>
    interval.C.slice(MEASURES.firstBank).reduce((sum, row) => sum + row[stoppingState]!, 0)
  const share = delivered(on) + (delivered(off) * rise) / fall
  const duty = Math.sqrt((2 * circuit.outputCurrent) / (rise * circuit.period * share))
  return [duty, (duty * rise) / fall]
}

function nestedDuties(circuit: Circuit): [number, number] {
  const wanted = circuit.design.output.voltage
  /** Rectifier duty at which its current has just gone, for a given duty; all of the off time if it has not. */
  const conductionFor = (duty: number) => {
    const current = (rectifierDuty: number) => discontinuousResidual(circuit, duty, rectifierDuty)[0]
    const whole = 1 - duty
    return current(whole) >= 0 ? whole : findRoot(current, whole * 1e-9, whole)
  }
  const error = (duty: number) => discontinuousResidual(circuit, duty, conductionFor(duty))[1] - wanted
  let low = SMALLEST_DUTY
  if (error(low) >= 0) throw unreachable(circuit)
  for (let high = 2 * low; ; high *= 2) {
    const limit = circuit.design.dutyLimit
    if (error(Math.min(high, limit)) >= 0) {
      const duty = findRoot(error, low, Math.min(high, limit))
      return [duty, conductionFor(duty)]
    }
    if (high >= limit) throw unreachable(circuit)
    low = high
  }
}

function discontinuousCycle(circuit: Circuit, duty: number, rectifierDuty: number) {
  const durations = [duty, rectifierDuty, 1 - duty - rectifierDuty].map((share) => share * circuit.period)
  const intervals = [circuit.on, circuit.off, circuit.idle]
  const flows = intervals.map((interval, i) => flowOf(interval, circuit.inputs, durations[i]!))
  const start = fixedPoint(flows, [null, circuit.stoppingState])
  if (!start) throw noOrbit(circuit)
  return { durations, intervals, flows, start }
}

function discontinuousOrbit(circuit: Circuit, duty: number, rectifierDuty: number): Orbit {
  const { durations, intervals, flows, start } = discontinuousCycle(circuit, duty, rectifierDuty)
  return {
    conduction: 'discontinuous',
    dutyCycle: duty,
    rectifierDuty,
    segments: segmentsFrom(start, intervals, flows, durations, [null, circuit.stoppingState]),
  }
}

/**
 * The state that one period maps onto itself. After flow k the state `resets[k]`, if any, is set to zero: the inductor
 * current at which conduction stopped.
 */
function fixedPoint(flows: readonly Flow[], resets: readonly (number | null)[]): Float64Array | null {
  const n = flows[0]!.g.length
  const map = new Float64Array(n * n)
  for (let i = 0; i < n; i++) map[i * n + i] = 1
  let E: Float64Array = map
  let g: Float64Array = new Float64Array(n)
  flows.forEach((flow, k) => {
    const nextE = new Float64Array(n * n)
    for (let i = 0; i < n; i++) {
      for (let m = 0; m < n; m++) {
        const factor = flow.E[i * n + m]!
        for (let j = 0; j < n; j++) nextE[i * n + j]! += factor * E[m * n + j]!
      }
    }
    g = advance(flow, g)
    E = nextE
    const reset = resets[k]
    if (reset !== undefined && reset !== null) {
      E.fill(0, reset * n, (reset + 1) * n)
      g[reset] = 0
    }
  })
  const matrix = E.map((value, i) => (i % (n + 1) === 0 ? 1 : 0) - value)
  const x = Float64Array.from(g)
  return solveReal(matrix, n, x, 1) ? x : null
}

function segmentsFrom(
  start: Float64Array,
  intervals: readonly Interval[],
  flows: readonly Flow[],
  durations: readonly number[],
  resets: readonly (number | null)[],
): Segment[] {
  let x = start
  return flows.map((flow, k) => {
    const end = advance(flow, x)
    const segment = { interval: intervals[k]!, duration: durations[k]!, start: x, end, transition: flow.E }
    x = Float64Array.from(end)
    const reset = resets[k]
    if (reset !== undefined && reset !== null) x[reset] = 0
    return segment
  })
}

function unreachable(circuit: Circuit): DesignError {
  const { design } = circuit
  return DesignError.at(
    'unreachable-output',
    'output.voltage',
    `No duty cycle from ${SMALLEST_DUTY} to ${design.dutyLimit} makes a ${design.topology} give ${shortNumber(design.output.voltage)} V from ${shortNumber(circuit.lineVoltage)} V at ${shortNumber(circuit.outputCurrent)} A.`,
  )
}

function noOrbit(circuit: Circuit): DesignError {
  return DesignError.at(
    'no-operating-point',
    'output.voltage',
    `No steady state was found at ${shortNumber(circuit.lineVoltage)} V and ${shortNumber(circuit.outputCurrent)} A. Check inductance, capacitance and load: they may be far from what ${shortNumber(circuit.design.switchingFrequency)} Hz needs.`,
  )
}

const shortNumber = (value: number): string => String(Number(value.toPrecision(4)))

/**
 * The periodic orbit: the steady state of the switched circuit, with the duty cycle at which the mean of the output
 * voltage over a period is the wanted one.
 */
import { MEASURES, type Circuit, type Interval } from '../circuit'
import { averagedOutput } from '../averaged/equilibrium'
import { DesignError } from '../errors'
import { identity, product } from '../numeric/exponential'
import { solveReal } from '../numeric/linearSystem'
import { findDiscontinuousOrbit } from './discontinuousOrbit'
import { findRoot } from '../numeric/rootFinding'
import { advance, flowOf, outputIntegral, read, type Flow } from './flow'

export interface Segment {
  readonly interval: Interval
  readonly duration: number // s
  readonly start: Float64Array
  readonly end: Float64Array
  /** e^(A·duration), n × n. */
  readonly transition: Float64Array
}

export interface Orbit {
  /** With several inductors, `discontinuous` is detected only: the segments are then those of continuous conduction. */
  readonly conduction: 'continuous' | 'discontinuous'
  readonly dutyCycle: number
  readonly rectifierDuty: number
  /** On, off and, in discontinuous conduction, idle. */
  readonly segments: readonly Segment[]
}

/** Share of the output voltage within which an orbit must meet it. */
const SETTLED = 1e-8

/** Smallest duty cycle that is looked at: below it a modulator does not work either. */
const SMALLEST_DUTY = 1e-5

/**
 * Finds the orbit. With a diode whose current would have to reverse, the one with discontinuous conduction.
 * @throws DesignError 'unreachable-output' or 'no-operating-point'.
 */
export function findOrbit(circuit: Circuit): Orbit {
  const isDiode = circuit.design.rectifier.kind === 'diode'
  const continuous = findContinuousOrbit(circuit)
  const isWhole = !(continuous instanceof DesignError)
  if (isWhole && !(isDiode && reverses(circuit, continuous))) return continuous
  if (isWhole && !circuit.canStop) return { ...continuous, conduction: 'discontinuous' }
  const discontinuous = isDiode && circuit.canStop ? findDiscontinuousOrbit(circuit) : null
  if (discontinuous) return discontinuous
  throw isWhole ? noOrbit(circuit) : continuous
}

/** Whether the rectifier's current is negative at the end of its interval. */
function reverses(circuit: Circuit, orbit: Orbit): boolean {
  const off = orbit.segments[1]!
  const current = (x: Float64Array) => read(off.interval, MEASURES.rectifierCurrent, x, circuit.inputs)
  return current(off.end) < 0
}

/** The orbit with the rectifier conducting all through the off time, or why there is none. */
export function findContinuousOrbit(circuit: Circuit): Orbit | DesignError {
  const wanted = circuit.design.output.voltage
  const bracket = bracketDuty(circuit)
  if (bracket instanceof DesignError) return bracket
  const error = (duty: number) => meanOutput(circuit, duty) - wanted
  try {
    const duty = findRoot(error, bracket.low, bracket.high)
    if (isSettled(error(duty), wanted)) return continuousOrbit(circuit, duty)
  } catch (cause) {
    if (!(cause instanceof RangeError)) throw cause
  }
  return noOrbit(circuit)
}

/** A root finder also closes in on a pole, such as a resonance in step with the switching; there the error stays. */
const isSettled = (error: number, wanted: number): boolean => Math.abs(error) <= SETTLED * Math.abs(wanted)

/**
 * Two duty cycles between which the mean output passes the wanted voltage for the first time. With losses a boost's
 * output rises with duty only up to a point; the branch before that point is the one a controller can hold.
 */
function bracketDuty(circuit: Circuit): { low: number; high: number } | DesignError {
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
        return DesignError.at(
          'unreachable-output',
          'output.voltage',
          `A ${design.topology} fed with ${shortNumber(circuit.lineVoltage)} V gives at least ${shortNumber(output)} V; ${shortNumber(wanted)} V lies below that.`,
        )
      }
      // The averaged circuit leaves ripple out, so the orbit's own crossing may lie just beside this interval.
      const reach = duty - previous
      return { low: Math.max(SMALLEST_DUTY, previous - reach), high: Math.min(design.dutyLimit, duty + reach) }
    }
    if (Number.isFinite(output)) best = Math.max(best, output)
    previous = duty
  }
  const limit = Math.round(design.dutyLimit * 1000) / 10
  return DesignError.at(
    'unreachable-output',
    'output.voltage',
    `A ${design.topology} fed with ${shortNumber(circuit.lineVoltage)} V reaches at most ${shortNumber(best)} V at ${shortNumber(circuit.outputCurrent)} A with a duty cycle up to ${limit} %; ${shortNumber(wanted)} V is asked for.`,
  )
}

/** Mean output voltage of the orbit with a given duty cycle, continuous conduction. */
function meanOutput(circuit: Circuit, duty: number): number {
  const flows = continuousFlows(circuit, duty)
  const start = fixedPoint(flows)
  if (!start) throw noOrbit(circuit)
  return (outputIntegral(flows[0]!, start) + outputIntegral(flows[1]!, advance(flows[0]!, start))) / circuit.period
}

const continuousFlows = (circuit: Circuit, duty: number): Flow[] => [
  flowOf(circuit.on, circuit.inputs, duty * circuit.period),
  flowOf(circuit.off, circuit.inputs, (1 - duty) * circuit.period),
]

function continuousOrbit(circuit: Circuit, duty: number): Orbit {
  const flows = continuousFlows(circuit, duty)
  const start = fixedPoint(flows)
  if (!start) throw noOrbit(circuit)
  const middle = advance(flows[0]!, start)
  return {
    conduction: 'continuous',
    dutyCycle: duty,
    rectifierDuty: 1 - duty,
    segments: [
      { interval: circuit.on, duration: duty * circuit.period, start, end: middle, transition: flows[0]!.E },
      {
        interval: circuit.off,
        duration: (1 - duty) * circuit.period,
        start: middle,
        end: advance(flows[1]!, middle),
        transition: flows[1]!.E,
      },
    ],
  }
}

/** The state that one period maps onto itself; null if the map has no unique one. */
function fixedPoint(flows: readonly Flow[]): Float64Array | null {
  const n = flows[0]!.g.length
  let E: Float64Array = identity(n)
  let g: Float64Array = new Float64Array(n)
  for (const flow of flows) {
    E = product(flow.E, E, n)
    g = advance(flow, g)
  }
  const matrix = E.map((value, i) => (i % (n + 1) === 0 ? 1 : 0) - value)
  return solveReal(matrix, n, g, 1) ? g : null
}

export function noOrbit(circuit: Circuit): DesignError {
  return DesignError.at(
    'no-operating-point',
    'output.voltage',
    `No steady state was found at ${shortNumber(circuit.lineVoltage)} V and ${shortNumber(circuit.outputCurrent)} A. Check inductance, capacitance and load: they may be far from what ${shortNumber(circuit.design.switchingFrequency)} Hz needs.`,
  )
}

const shortNumber = (value: number): string => String(Number(value.toPrecision(4)))

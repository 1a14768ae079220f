/**
 * The periodic orbit with the loop closed. The reference is taken as trimmed so that the output's mean is the wanted
 * one; then the power stage runs on its open-loop orbit, and the network on the periodic answer to its ripple. What the
 * ripple does to the comparator is in the closed-loop period map, whose eigenvalues decide whether the switched loop is
 * stable, however good the averaged margins look.
 */
import { MEASURES, type Circuit } from '../circuit'
import type { Network } from '../compensators/networks'
import { modulus } from '../numeric/complex'
import { eigenvalues } from '../numeric/eigen'
import { identity, product } from '../numeric/exponential'
import { solveReal } from '../numeric/linearSystem'
import type { ClosedLoopMap } from '../results'
import { eventsOf } from '../switched/events'
import { advance, dot, flowOf, read } from '../switched/flow'
import type { Orbit, Segment } from '../switched/orbit'
import { periodMatrix } from '../switched/periodMap'
import { closeCircuit, type ClosedCircuit } from './closedCircuit'
import { DesignError } from '../errors'

/** An ideal integrator is at rest wherever it stands; with a trace of leak it stands near zero, and the bias does the rest. */
const INTEGRATOR_LEAK = 1e-9

/** Instants in the on time at which the comparator is checked for an earlier crossing. */
const CHECKS = 64

export interface ClosedOrbit {
  readonly circuit: ClosedCircuit
  readonly orbit: Orbit
  /** Peak to peak of the control voltage over a period, V. */
  readonly controlRipple: number
  /** Whether the comparator's inputs meet before the pulse's end: then the orbit is not the one that runs. */
  readonly firesEarly: boolean
}

/** @throws DesignError 'no-operating-point' if the network has no periodic answer. */
export function closedOrbit(open: Circuit, orbit: Orbit, network: Network): ClosedOrbit {
  const unbiased = closeCircuit(open, network)
  const segments = joinSegments(unbiased, orbit)
  const turnOff = segments[0]!.end
  const wanted = comparatorLevel(unbiased, turnOff, segments[0]!.duration)
  const bias = wanted - dot(unbiased.control.overStates, turnOff)
  const circuit = { ...unbiased, inputs: [...unbiased.inputs.slice(0, -1), bias] }
  const samples = segments.map((segment) => sample(circuit, segment))
  const control = samples.flat().map((x) => dot(circuit.control.overStates, x))
  const on = samples[0]!.slice(0, -1)
  return {
    circuit,
    orbit: { ...orbit, segments },
    controlRipple: Math.max(...control) - Math.min(...control),
    firesEarly: on.some((x, k) => {
      const level = comparatorLevel(circuit, x, (segments[0]!.duration * k) / CHECKS)
      return level >= bias + dot(circuit.control.overStates, x)
    }),
  }
}

/** Ramp, or sensed current plus slope, at an instant of the on time. */
function comparatorLevel(
  { design: { modulator }, on, inputs, period }: Circuit,
  x: ArrayLike<number>,
  t: number,
): number {
  if (modulator.kind === 'voltage-mode') return (modulator.rampAmplitude * t) / period
  const current = read(on, MEASURES.switchCurrent, x, inputs)
  return modulator.currentSenseResistance * current + modulator.slopeCompensation * t
}

/** The open-loop segments with the network's periodic states beside them. */
function joinSegments(circuit: ClosedCircuit, orbit: Orbit): Segment[] {
  const n = orbit.segments[0]!.start.length
  const size = circuit.states.length
  const intervals = [circuit.on, circuit.off, circuit.idle]
  const flows = orbit.segments.map(({ duration }, k) => flowOf(intervals[k]!, circuit.inputs, duration))
  // The network's share of the whole map, with the power stage's states known at the start of each segment.
  const m = size - n
  let map: Float64Array = identity(m)
  let offset = new Float64Array(m)
  orbit.segments.forEach((segment, k) => {
    const flow = flows[k]!
    const own = new Float64Array(m * m)
    const next = new Float64Array(m)
    for (let i = 0; i < m; i++) {
      const row = flow.E.subarray((n + i) * size, (n + i + 1) * size)
      own.set(row.subarray(n), i * m)
      next[i] = flow.g[n + i]! + dot(segment.start, row) + dot(offset, row.subarray(n))
    }
    map = product(own, map, m)
    offset = next
  })
  const rest = restOf(map, offset, 0) ?? restOf(map, offset, INTEGRATOR_LEAK)
  if (!rest) {
    throw DesignError.at(
      'no-operating-point',
      'compensator',
      'The network has no steady answer to the ripple of the output.',
    )
  }
  let amplifier = rest
  return orbit.segments.map((segment, k) => {
    const start = Float64Array.from([...segment.start, ...amplifier])
    const end = advance(flows[k]!, start)
    amplifier = end.slice(n)
    // The power stage's own end is the more exact: it was found by Newton.
    end.set(segment.end)
    return { interval: intervals[k]!, duration: segment.duration, start, end, transition: flows[k]!.E }
  })
}

/** The state that x → map·x + offset leaves as it is; null if there is no single one. */
function restOf(map: Float64Array, offset: Float64Array, leak: number): Float64Array | null {
  const m = offset.length
  const matrix = map.map((value, i) => (i % (m + 1) === 0 ? 1 + leak : 0) - value)
  const rest = Float64Array.from(offset)
  return solveReal(matrix, m, rest, 1) ? rest : null
}

/** States at equally spaced instants of a segment. */
function sample(circuit: ClosedCircuit, { interval, start, duration }: Segment): Float64Array[] {
  const flow = flowOf(interval, circuit.inputs, duration / CHECKS)
  const states = [start]
  for (let k = 0; k < CHECKS; k++) states.push(advance(flow, states[k]!))
  return states
}

/** Multipliers of the closed loop, and in words what is wrong where it is unstable. */
export function closedLoopMap(open: Circuit, orbit: Orbit, network: Network): ClosedLoopMap {
  const closed = closedOrbit(open, orbit, network)
  const { rampSpan } = span(closed)
  const shared = { controlRipple: closed.controlRipple, rampSpan, firesEarly: closed.firesEarly }
  if (closed.firesEarly) return { ...shared, multipliers: [], isStable: false }
  let events
  try {
    events = eventsOf(closed.circuit, closed.orbit)
  } catch (cause) {
    // The ripple at the comparator falls as fast as its ramp rises: no clean crossing.
    if (cause instanceof DesignError) return { ...shared, multipliers: [], isStable: false }
    throw cause
  }
  const multipliers = eigenvalues(periodMatrix(closed.orbit, events)).map((value) => ({
    real: value.re,
    imaginary: value.im,
    modulus: modulus(value),
  }))
  return { ...shared, multipliers, isStable: multipliers.every((m) => m.modulus < 1) }
}

/** How far the comparator's other input rises during the pulse, V. */
function span({ circuit, orbit }: ClosedOrbit): { rampSpan: number } {
  const first = orbit.segments[0]!
  return { rampSpan: comparatorLevel(circuit, first.end, first.duration) - comparatorLevel(circuit, first.start, 0) }
}

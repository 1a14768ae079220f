/**
 * Exact small-signal responses about the periodic orbit: what an ideal analyser reads as its injection vanishes.
 *
 * With an injection û·e^{jωt} the disturbance is x̂(t) = z(t)·e^{jωt}, z periodic. In a segment ż = (A − jω)z + B·û; at
 * its end the moved switching instant displaces z. Periodicity gives z(0) from one small complex system, and the answer
 * is the mean of ŷ·e^{−jωt}: since z solves a linear equation, its integral over a segment is
 *   ∫z dt = (jω − A)⁻¹·(z_start − z_end + B·û·τ),
 * to which each moved step of the output adds a pulse of its height and the width δt.
 * Sources: Brown and Middlebrook, "Sampled-data modeling of switching regulators", PESC 1981; Tymerski, "Application of
 * the time-varying transfer function for exact small-signal analysis", IEEE Trans. Power Electronics 1994.
 */
import { INPUTS } from '../network'
import { MEASURES, type Circuit } from '../circuit'
import type { Complex } from '../numeric/complex'
import { invertComplex } from '../numeric/complexInverse'
import { flatten } from '../numeric/linearSystem'
import { eventsOf } from './events'
import { read } from './flow'
import type { Orbit } from './orbit'

export interface SwitchedResponses {
  readonly controlToOutput: Complex // V/V
  readonly lineToOutput: Complex // V/V
  readonly outputImpedance: Complex // Ω, of a current drawn
}

/** Answers of one measure to control (per V), line (per V) and load current drawn (per A). */
export interface MeasureResponses {
  readonly toControl: Complex
  readonly toLine: Complex
  readonly toLoad: Complex
}

/** Injections, in the order in which they are carried through the loop below. */
const CONTROL = 0
const LINE = 1
const LOAD = 2
const CHANNELS = 3

/** Responses of the output voltage as functions of ω in rad/s; ω > 0. */
export function switchedResponses(circuit: Circuit, orbit: Orbit): (omega: number) => SwitchedResponses {
  const respond = measureResponses(circuit, orbit, MEASURES.outputVoltage)
  return (omega) => {
    const { toControl, toLine, toLoad } = respond(omega)
    return {
      controlToOutput: toControl,
      lineToOutput: toLine,
      outputImpedance: { re: -toLoad.re, im: -toLoad.im },
    }
  }
}

/** Prepares the orbit and returns the responses of one of `MEASURES` as functions of ω in rad/s; ω > 0. */
export function measureResponses(circuit: Circuit, orbit: Orbit, measure: number): (omega: number) => MeasureResponses {
  const n = circuit.states.length
  const events = eventsOf(circuit, orbit)
  const segments = orbit.segments.map(({ interval, duration, transition }) => ({
    A: flatten(interval.A),
    /** Columns of the line and the load, n × 2. */
    B: flatten(interval.B.map((row) => [row[INPUTS.indexOf('line')]!, row[INPUTS.indexOf('load')]!])),
    output: Float64Array.from(interval.C[measure]!),
    through: [0, interval.D[measure]![INPUTS.indexOf('line')]!, interval.D[measure]![INPUTS.indexOf('load')]!],
    E: transition,
    duration,
  }))
  const valueAt = (k: number, side: 'start' | 'end') => {
    const segment = orbit.segments[k]!
    return read(segment.interval, measure, segment[side], circuit.inputs)
  }
  const stops = events.map((event, k) => ({
    gradient: event.stateGradient,
    /** Minus what each injection adds to the surface. */
    drive: [
      event.control,
      -event.inputGradient[INPUTS.indexOf('line')]!,
      -event.inputGradient[INPUTS.indexOf('load')]!,
    ],
    rate: event.rate,
    displacement: event.displacement,
    /** The measure before minus after the switching instant. */
    step: valueAt(k, 'end') - valueAt(k + 1, 'start'),
  }))

  const count = segments.length
  const inverseRe = segments.map(() => new Float64Array(n * n))
  const inverseIm = segments.map(() => new Float64Array(n * n))
  const forcedRe = segments.map(() => new Float64Array(n * CHANNELS)) // (jω − A)⁻¹·B, one column an injection
  const forcedIm = segments.map(() => new Float64Array(n * CHANNELS))
  const periodRe = new Float64Array(n * n)
  const periodIm = new Float64Array(n * n)
  const order = new Int32Array(n)
  const zRe = new Float64Array(n)
  const zIm = new Float64Array(n)
  const nextRe = new Float64Array(n)
  const nextIm = new Float64Array(n)
  const startRe = new Float64Array(n * CHANNELS)
  const startIm = new Float64Array(n * CHANNELS)
  const sumRe = new Float64Array(CHANNELS)
  const sumIm = new Float64Array(CHANNELS)
  let delayRe = 0
  let delayIm = 0

  /** z at the end of segment k from z at its start, before the event; in `nextRe`, `nextIm`. */
  function flowThrough(k: number, channel: number, cos: number, sin: number): void {
    const { E } = segments[k]!
    const wRe = forcedRe[k]!
    const wIm = forcedIm[k]!
    for (let i = 0; i < n; i++) {
      let re = 0
      let im = 0
      for (let j = 0; j < n; j++) {
        const e = E[i * n + j]!
        re += e * (zRe[j]! - wRe[j * CHANNELS + channel]!)
        im += e * (zIm[j]! - wIm[j * CHANNELS + channel]!)
      }
      // times e^{−jωτ}
      nextRe[i] = re * cos + im * sin + wRe[i * CHANNELS + channel]!
      nextIm[i] = im * cos - re * sin + wIm[i * CHANNELS + channel]!
    }
  }

  /** Moves z across the event that ends segment k; leaves δt in `delayRe`, `delayIm`. */
  function cross(k: number, drive: number): void {
    const stop = stops[k]!
    let re = -drive
    let im = 0
    for (let i = 0; i < n; i++) {
      re += stop.gradient[i]! * nextRe[i]!
      im += stop.gradient[i]! * nextIm[i]!
    }
    delayRe = -re / stop.rate
    delayIm = -im / stop.rate
    for (let i = 0; i < n; i++) {
      nextRe[i]! += stop.displacement[i]! * delayRe
      nextIm[i]! += stop.displacement[i]! * delayIm
    }
  }

  function invertAll(omega: number): boolean {
    for (let k = 0; k < count; k++) {
      const { A, B } = segments[k]!
      const re = inverseRe[k]!
      const im = inverseIm[k]!
      for (let i = 0; i < n * n; i++) {
        re[i] = -A[i]!
        im[i] = 0
      }
      for (let i = 0; i < n; i++) im[i * n + i] = omega
      if (!invertComplex(re, im, n, order)) return false
      for (let i = 0; i < n; i++) {
        for (let column = 0; column < 2; column++) {
          let sumOfRe = 0
          let sumOfIm = 0
          for (let j = 0; j < n; j++) {
            sumOfRe += re[i * n + j]! * B[j * 2 + column]!
            sumOfIm += im[i * n + j]! * B[j * 2 + column]!
          }
          forcedRe[k]![i * CHANNELS + column + 1] = sumOfRe
          forcedIm[k]![i * CHANNELS + column + 1] = sumOfIm
        }
      }
    }
    return true
  }

  /** One period from z; the state at its end stays in `zRe`, `zIm`. */
  function runPeriod(channel: number, isDriven: boolean, isRead: boolean, cos: Float64Array, sin: Float64Array): void {
    for (let k = 0; k < count; k++) {
      flowThrough(k, isDriven ? channel : CONTROL, cos[k]!, sin[k]!)
      if (isRead) readSegment(k, channel)
      if (k < count - 1) {
        cross(k, isDriven ? stops[k]!.drive[channel]! : 0)
        if (isRead) {
          sumRe[channel]! += stops[k]!.step * delayRe
          sumIm[channel]! += stops[k]!.step * delayIm
        }
      }
      zRe.set(nextRe)
      zIm.set(nextIm)
    }
  }

  /** Adds ∫ŷ·e^{−jωt}dt of segment k, from z at its start and `next` at its end. */
  function readSegment(k: number, channel: number): void {
    const { B, output, through, duration } = segments[k]!
    const re = inverseRe[k]!
    const im = inverseIm[k]!
    for (let j = 0; j < n; j++) {
      const driven = channel === CONTROL ? 0 : B[j * 2 + channel - 1]! * duration
      const a = zRe[j]! - nextRe[j]! + driven
      const b = zIm[j]! - nextIm[j]!
      for (let i = 0; i < n; i++) {
        const c = output[i]!
        sumRe[channel]! += c * (re[i * n + j]! * a - im[i * n + j]! * b)
        sumIm[channel]! += c * (re[i * n + j]! * b + im[i * n + j]! * a)
      }
    }
    sumRe[channel]! += through[channel]! * duration
  }

  const cos = new Float64Array(count)
  const sin = new Float64Array(count)

  return function respond(omega: number): MeasureResponses {
    // An undamped circuit hit exactly at its own resonance: step aside by less than any reading can tell.
    if (!invertAll(omega)) return respond(omega * (1 + 1e-9))
    for (let k = 0; k < count; k++) {
      cos[k] = Math.cos(omega * segments[k]!.duration)
      sin[k] = Math.sin(omega * segments[k]!.duration)
    }
    // Columns of the period map, from unit states without injection: I − Φ·e^{−jωT}.
    for (let j = 0; j < n; j++) {
      zRe.fill(0)
      zIm.fill(0)
      zRe[j] = 1
      runPeriod(CONTROL, false, false, cos, sin)
      for (let i = 0; i < n; i++) {
        periodRe[i * n + j] = (i === j ? 1 : 0) - zRe[i]!
        periodIm[i * n + j] = -zIm[i]!
      }
    }
    if (!invertComplex(periodRe, periodIm, n, order)) return respond(omega * (1 + 1e-9))
    for (let channel = 0; channel < CHANNELS; channel++) {
      zRe.fill(0)
      zIm.fill(0)
      runPeriod(channel, true, false, cos, sin)
      for (let i = 0; i < n; i++) {
        startRe[i * CHANNELS + channel] = zRe[i]!
        startIm[i * CHANNELS + channel] = zIm[i]!
      }
    }
    sumRe.fill(0)
    sumIm.fill(0)
    for (let channel = 0; channel < CHANNELS; channel++) {
      for (let i = 0; i < n; i++) {
        let re = 0
        let im = 0
        for (let j = 0; j < n; j++) {
          const a = periodRe[i * n + j]!
          const b = periodIm[i * n + j]!
          const c = startRe[j * CHANNELS + channel]!
          const d = startIm[j * CHANNELS + channel]!
          re += a * c - b * d
          im += a * d + b * c
        }
        zRe[i] = re
        zIm[i] = im
      }
      runPeriod(channel, true, true, cos, sin)
    }
    const T = circuit.period
    return {
      toControl: { re: sumRe[CONTROL]! / T, im: sumIm[CONTROL]! / T },
      toLine: { re: sumRe[LINE]! / T, im: sumIm[LINE]! / T },
      toLoad: { re: sumRe[LOAD]! / T, im: sumIm[LOAD]! / T },
    }
  }
}

/**
 * The loop that the current comparator closes, exactly: a small disturbance is injected between sensed current and
 * comparator, the duty answers the injection alone, and what comes back at the comparator's instant is read.
 * Source: Brown and Middlebrook, "Sampled-data modeling of switching regulators", PESC 1981.
 */
import type { Circuit } from '../circuit'
import type { Complex } from '../numeric/complex'
import { invertComplex } from '../numeric/complexInverse'
import { eventsOf } from './events'
import type { Orbit } from './orbit'
import { periodMatrix } from './periodMap'

/** T_i(ω), current mode only; ω in rad/s. */
export function innerCurrentLoop(circuit: Circuit, orbit: Orbit): (omega: number) => Complex {
  const [comparator, ...later] = eventsOf(circuit, orbit)
  if (!comparator) throw new TypeError('an orbit has at least the comparator event')
  const n = circuit.states.length
  const open = { ...comparator, stateGradient: new Float64Array(n) }
  // Over one period without the comparator's own feedback, seen just before its instant.
  const whole = periodMatrix(orbit, [open, ...later])
  const on = orbit.segments[0]!.transition
  const displaced = Array.from(comparator.displacement, (value) => value / comparator.rate)
  const afterEvent = carryToEnd(orbit, later, displaced)
  const re = new Float64Array(n * n)
  const im = new Float64Array(n * n)
  const order = new Int32Array(n)
  const row = Array.from({ length: n }, (_, j) =>
    comparator.stateGradient.reduce((sum, value, i) => sum + value * on[i * n + j]!, 0),
  )
  return (omega) => {
    // x(0) = e^{−jωT}·(Φ·x(0) + r), r carried from the event to the period's end; returned: h·e^{A·DT}·x(0).
    const cos = Math.cos(omega * circuit.period)
    const sin = Math.sin(omega * circuit.period)
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        re[i * n + j] = (i === j ? cos : 0) - whole[i]![j]!
        im[i * n + j] = i === j ? sin : 0
      }
    }
    invertComplex(re, im, n, order)
    let sumRe = 0
    let sumIm = 0
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        sumRe += row[i]! * re[i * n + j]! * afterEvent[j]!
        sumIm += row[i]! * im[i * n + j]! * afterEvent[j]!
      }
    }
    // A larger sensed current shortens the pulse: the loop's own inversion is left out, as in every loop gain here.
    return { re: sumRe, im: sumIm }
  }
}

/** A displacement just after the comparator's event, carried through the rest of the period. */
function carryToEnd(orbit: Orbit, later: ReturnType<typeof eventsOf>, displacement: number[]): number[] {
  const n = displacement.length
  let x = displacement
  orbit.segments.slice(1).forEach(({ transition }, k) => {
    x = x.map((_, i) => x.reduce((sum, value, m) => sum + transition[i * n + m]! * value, 0))
    const event = later[k]
    if (!event) return
    const delay = -x.reduce((sum, value, i) => sum + event.stateGradient[i]! * value, 0) / event.rate
    x = x.map((value, i) => value + event.displacement[i]! * delay)
  })
  return x
}

/**
 * A brute-force converter for the tests, written from Kirchhoff's laws of each circuit and sharing no code with the
 * engine: Runge–Kutta steps through every period, the comparator and the diode switching where their quantity crosses.
 * A small sine on the control voltage, the line or the load current is read from the output by correlation, as an
 * analyser on the bench does.
 */
import type { Topology } from '@/converters/document'

export interface SimulatedConverter {
  readonly topology: Topology
  readonly switchingFrequency: number
  readonly lineVoltage: number
  readonly loadConductance: number // S
  readonly loadCurrent: number // A drawn beside the conductance
  readonly inductance: number
  readonly inductorResistance: number
  readonly secondInductance: number // sepic, cuk
  readonly secondResistance: number
  readonly coupling: number // F, sepic, cuk
  readonly couplingEsr: number
  readonly turnsRatio: number // flyback, forward
  readonly capacitance: number
  readonly esr: number // Ω, above zero
  readonly switchResistance: number
  readonly rectifierResistance: number
  readonly forwardVoltage: number
  readonly isDiode: boolean
  readonly controlVoltage: number
  /** Comparator input: sensing·(switch current) + slope·t against the control voltage; sensing 0 is voltage mode. */
  readonly sensing: number // Ω
  readonly slope: number // V/s
}

export type Injection = 'control' | 'line' | 'load'
type Phase = 'on' | 'off' | 'idle'
interface Sine {
  readonly at: Injection
  readonly amplitude: number
  readonly omega: number
}
/** Inductor current, second inductor's current, coupling capacitor's voltage, output capacitor's voltage. */
type State = readonly [number, number, number, number]

const STEPS = 160
const SETTLING_PERIODS = 400

const added = (sine: Sine, at: Injection, t: number): number =>
  sine.at === at ? sine.amplitude * Math.cos(sine.omega * t) : 0

const switchCurrent = (c: SimulatedConverter, [i, i2]: State): number =>
  c.topology === 'sepic' || c.topology === 'cuk' ? i + i2 : c.topology === 'forward' ? c.turnsRatio * i : i

/** Current that the stage pushes into capacitor and load. */
function delivered(c: SimulatedConverter, phase: Phase, [i, i2]: State): number {
  switch (c.topology) {
    case 'buck':
    case 'forward':
      return phase === 'idle' ? 0 : i
    case 'boost':
    case 'buck-boost':
      return phase === 'off' ? i : 0
    case 'flyback':
      return phase === 'off' ? i / c.turnsRatio : 0
    case 'sepic':
      return phase === 'off' ? i + i2 : 0
    case 'cuk':
      return i2
  }
}

function outputVoltage(c: SimulatedConverter, phase: Phase, state: State, load: number): number {
  return (delivered(c, phase, state) - load + state[3] / c.esr) / (c.loadConductance + 1 / c.esr)
}

/** Voltages across the first and the second inductor and current of the coupling capacitor, polarities as drawn. */
function branches(
  c: SimulatedConverter,
  phase: Phase,
  state: State,
  line: number,
  output: number,
): [number, number, number] {
  const [i, i2, vc] = state
  const n = c.turnsRatio
  const onDrop = switchCurrent(c, state) * c.switchResistance
  const diode = c.forwardVoltage + c.rectifierResistance * (c.topology === 'flyback' ? i / n : i)
  const isOn = phase === 'on'
  switch (c.topology) {
    case 'buck':
      return [(isOn ? line - onDrop : -diode) - output, 0, 0]
    case 'boost':
      return [line - (isOn ? onDrop : output + diode), 0, 0]
    case 'buck-boost':
      return [isOn ? line - onDrop : -(output + diode), 0, 0]
    case 'flyback':
      return [isOn ? line - onDrop : -(output + diode) / n, 0, 0]
    case 'forward':
      return [(isOn ? n * (line - onDrop) : 0) - diode - output, 0, 0]
    case 'sepic': {
      // The second current is counted from ground into z, so that both flow through switch and rectifier.
      const through = c.forwardVoltage + c.rectifierResistance * (i + i2)
      return isOn
        ? [line - onDrop, vc - onDrop - c.couplingEsr * i2, -i2]
        : [line - vc - c.couplingEsr * i - output - through, -(output + through), i]
    }
    case 'cuk': {
      const through = c.forwardVoltage + c.rectifierResistance * (i + i2)
      return isOn
        ? [line - onDrop, vc - onDrop - c.couplingEsr * i2 - output, -i2]
        : [line - vc - c.couplingEsr * i - through, -(output + through), i]
    }
  }
}

function slopes(c: SimulatedConverter, phase: Phase, state: State, t: number, sine: Sine): State {
  const output = outputVoltage(c, phase, state, c.loadCurrent + added(sine, 'load', t))
  const dv = (output - state[3]) / (c.esr * c.capacitance)
  if (phase === 'idle') return [0, 0, 0, dv]
  const [across, acrossSecond, charging] = branches(c, phase, state, c.lineVoltage + added(sine, 'line', t), output)
  return [
    (across - state[0] * c.inductorResistance) / c.inductance,
    c.secondInductance > 0 ? (acrossSecond - state[1] * c.secondResistance) / c.secondInductance : 0,
    c.coupling > 0 ? charging / c.coupling : 0,
    dv,
  ]
}

const along = (s: State, k: State, share: number): State => [
  s[0] + k[0] * share,
  s[1] + k[1] * share,
  s[2] + k[2] * share,
  s[3] + k[3] * share,
]

/** One step of the classical Runge–Kutta method. */
function step(c: SimulatedConverter, phase: Phase, s: State, t: number, h: number, sine: Sine): State {
  const k1 = slopes(c, phase, s, t, sine)
  const k2 = slopes(c, phase, along(s, k1, h / 2), t + h / 2, sine)
  const k3 = slopes(c, phase, along(s, k2, h / 2), t + h / 2, sine)
  const k4 = slopes(c, phase, along(s, k3, h), t + h, sine)
  return along(along(along(along(s, k1, h / 6), k2, h / 3), k3, h / 3), k4, h / 6)
}

/** Runs the converter and returns the output's complex amplitude at ω and its mean, over `periods` periods. */
function correlate(c: SimulatedConverter, start: State, sine: Sine, periods: number) {
  const T = 1 / c.switchingFrequency
  let state = start
  const sum = { re: 0, im: 0, mean: 0 }
  for (let period = 0; period < SETTLING_PERIODS + periods; period++) {
    const begin = period * T
    let phase: Phase = 'on'
    let t = begin
    /** Positive until the phase ends. */
    const guard = (s: State, time: number): number =>
      phase === 'on'
        ? c.controlVoltage + added(sine, 'control', time) - c.sensing * switchCurrent(c, s) - c.slope * (time - begin)
        : phase === 'off' && c.isDiode
          ? s[0] + s[1]
          : 1
    while (t < begin + T * (1 - 1e-12)) {
      let h = Math.min(T / STEPS, begin + T - t)
      let next = step(c, phase, state, t, h, sine)
      const ends = guard(next, t + h) <= 0
      if (ends) {
        h = crossing((share) => guard(step(c, phase, state, t, share, sine), t + share), h)
        next = step(c, phase, state, t, h, sine)
      }
      if (period >= SETTLING_PERIODS) {
        const weigh = (s: State, time: number) => {
          const output = outputVoltage(c, phase, s, c.loadCurrent + added(sine, 'load', time))
          sum.re += (output * Math.cos(sine.omega * time) * h) / 2
          sum.im -= (output * Math.sin(sine.omega * time) * h) / 2
          sum.mean += (output * h) / 2
        }
        weigh(state, t)
        weigh(next, t + h)
      }
      state = next
      t += h
      if (ends) {
        if (phase === 'off') state = [0, 0, state[2], state[3]]
        phase = phase === 'on' ? 'off' : 'idle'
      }
    }
  }
  const span = periods * T
  return { re: (2 * sum.re) / span, im: (2 * sum.im) / span, mean: sum.mean / span }
}

/** Where f, positive at 0 and not at `high`, reaches zero: bisection to the last digits. */
function crossing(f: (x: number) => number, high: number): number {
  let low = 0
  let top = high
  for (let k = 0; k < 46; k++) {
    const middle = (low + top) / 2
    if (f(middle) > 0) low = middle
    else top = middle
  }
  return top
}

export interface InjectionReading {
  readonly gainDb: number
  readonly phaseDeg: number
  readonly meanOutput: number
}

/**
 * Injects cos(ωt) with a plus and a minus sign and takes half the difference, so that even-order distortion cancels.
 * @param cycles - periods of the sine and of the switching within one reading.
 * @param start - where to start from; near the steady state saves time.
 */
export function inject(
  converter: SimulatedConverter,
  at: Injection,
  cycles: { readonly sine: number; readonly switching: number },
  start: State,
): InjectionReading {
  const omega = (2 * Math.PI * converter.switchingFrequency * cycles.sine) / cycles.switching
  const size = { control: converter.controlVoltage, line: converter.lineVoltage, load: 1 }[at] * 2e-4
  const [plus, minus] = [size, -size].map((amplitude) =>
    correlate(converter, start, { at, amplitude, omega }, cycles.switching),
  )
  // The output impedance is of a current drawn: minus the output's answer to it.
  const sign = (at === 'load' ? -1 : 1) / (2 * size)
  const re = (plus!.re - minus!.re) * sign
  const im = (plus!.im - minus!.im) * sign
  return {
    gainDb: 20 * Math.log10(Math.hypot(re, im)),
    phaseDeg: (Math.atan2(im, re) * 180) / Math.PI,
    meanOutput: (plus!.mean + minus!.mean) / 2,
  }
}

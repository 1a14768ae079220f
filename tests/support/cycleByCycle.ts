/**
 * A brute-force converter for the tests, written from Kirchhoff's laws of each circuit and sharing no code with the
 * engine: Runge–Kutta steps through every period, the comparator and the diode switching where their quantity crosses.
 * A small sine on the control voltage, the line or the load current is read from the output by correlation, as an
 * analyser on the bench does.
 */
export interface SimulatedConverter {
  readonly topology: 'buck' | 'boost'
  readonly switchingFrequency: number
  readonly lineVoltage: number
  readonly loadConductance: number // S
  readonly loadCurrent: number // A drawn beside the conductance
  readonly inductance: number
  readonly inductorResistance: number
  readonly capacitance: number
  readonly esr: number // Ω, above zero
  readonly switchResistance: number
  readonly rectifierResistance: number
  readonly forwardVoltage: number
  readonly isDiode: boolean
  readonly controlVoltage: number
  /** Comparator input: sensing·i + slope·t against the control voltage; sensing 0 is voltage mode. */
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
interface State {
  i: number
  v: number
}

const STEPS = 200
const SETTLING_PERIODS = 500

const added = (sine: Sine, at: Injection, t: number): number =>
  sine.at === at ? sine.amplitude * Math.cos(sine.omega * t) : 0

function outputVoltage(c: SimulatedConverter, phase: Phase, { i, v }: State, load: number): number {
  const delivered = phase === 'idle' ? 0 : c.topology === 'buck' || phase === 'off' ? i : 0
  return (delivered - load + v / c.esr) / (c.loadConductance + 1 / c.esr)
}

function slopes(c: SimulatedConverter, phase: Phase, state: State, t: number, sine: Sine): State {
  const output = outputVoltage(c, phase, state, c.loadCurrent + added(sine, 'load', t))
  const dv = (output - state.v) / (c.esr * c.capacitance)
  if (phase === 'idle') return { i: 0, v: dv }
  const line = c.lineVoltage + added(sine, 'line', t)
  const { i } = state
  const across =
    phase === 'on'
      ? line - i * c.switchResistance - (c.topology === 'buck' ? output : 0)
      : (c.topology === 'boost' ? line : 0) - c.forwardVoltage - i * c.rectifierResistance - output
  return { i: (across - i * c.inductorResistance) / c.inductance, v: dv }
}

/** One step of the classical Runge–Kutta method. */
function step(c: SimulatedConverter, phase: Phase, s: State, t: number, h: number, sine: Sine): State {
  const at = (k: State, share: number): State => ({ i: s.i + k.i * share, v: s.v + k.v * share })
  const k1 = slopes(c, phase, s, t, sine)
  const k2 = slopes(c, phase, at(k1, h / 2), t + h / 2, sine)
  const k3 = slopes(c, phase, at(k2, h / 2), t + h / 2, sine)
  const k4 = slopes(c, phase, at(k3, h), t + h, sine)
  return {
    i: s.i + (h / 6) * (k1.i + 2 * k2.i + 2 * k3.i + k4.i),
    v: s.v + (h / 6) * (k1.v + 2 * k2.v + 2 * k3.v + k4.v),
  }
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
        ? c.controlVoltage + added(sine, 'control', time) - c.sensing * s.i - c.slope * (time - begin)
        : phase === 'off' && c.isDiode
          ? s.i
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
        if (phase === 'off') state = { i: 0, v: state.v }
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
 */
export function inject(
  converter: SimulatedConverter,
  at: Injection,
  cycles: { readonly sine: number; readonly switching: number },
): InjectionReading {
  const omega = (2 * Math.PI * converter.switchingFrequency * cycles.sine) / cycles.switching
  const size = { control: converter.controlVoltage, line: converter.lineVoltage, load: 1 }[at] * 2e-4
  const start = { i: 0, v: 0 }
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

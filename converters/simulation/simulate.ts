/** The closed loop cycle by cycle through a load step, a line step, a soft start or an overload. */
import { fittedNetwork } from '../compensators/fitted'
import { networkGain, networkStateSpace, type Network } from '../compensators/networks'
import type { DesignDocument } from '../document'
import { DesignError } from '../errors'
import { closeLoop } from '../loop/closedLoop'
import { stepResponse } from '../loop/stepResponse'
import { complex, divide, multiply } from '../numeric/complex'
import { eigenvalues } from '../numeric/eigen'
import { flatten, solveReal } from '../numeric/linearSystem'
import { dot } from '../switched/flow'
import { openPlant, type OpenPlant } from '../plant'
import { curve, defaultFrequencies } from '../responseCurve'
import type { Simulation, StepResponse } from '../results'
import { switchedResponses } from '../switched/response'
import { BIAS, TARGET } from './closedCircuit'
import { closedLoopMap, closedOrbit, type ClosedOrbit } from './closedOrbit'
import { readTransient } from './readings'
import type { SimulationOptions } from './scenario'
import { createSimulator, type Cycle, type Limits, type Simulator } from './simulator'

/** Periods at rest before anything happens. */
const BEFORE = 20
const LOOP_FREQUENCIES = 120
/** rad/s; a millionth of what any loop here works at. */
const LEAKAGE = 1e-3

interface Plan {
  readonly lineVoltage: number
  readonly outputCurrent: number
  /** Line, extra load and target (a share of the output) of a period. */
  readonly inputs: (cycle: number) => { line: number; extraLoad: number; target: number }
  readonly fromRest: boolean
  readonly cycles: number
  readonly step: { readonly input: 0 | 1; readonly size: number } | null
}

export function simulateLoop(design: DesignDocument, options: SimulationOptions): Simulation {
  const network = fittedNetwork(design)
  if (!network) {
    throw DesignError.at(
      'invalid-compensator',
      'compensator',
      'A closed loop needs a compensator; propose or enter one first.',
    )
  }
  const plan = planOf(design, options)
  const plant = openPlant(design, plan)
  const closed = closedOrbit(plant.circuit, plant.orbit, network)
  const map = closedLoopMap(plant.circuit, plant.orbit, network)
  const prediction = plan.step && predictionOf(plant, network, plan.step)
  const cycles = options.cycles ?? Math.max(plan.cycles, settlingCycles(plant, network))
  const limits = limitsOf(design, closed)
  const simulator = createSimulator(
    closed.circuit,
    plan.fromRest ? atRest(closed, plant.circuit.states.length, limits) : closed.orbit.segments[0]!.start,
    limits,
  )
  const history: Cycle[] = []
  for (let k = 0; k < BEFORE + cycles; k++) {
    const cycle = runPeriod(simulator, plan.inputs(k))
    if (!Object.values(cycle).every(Number.isFinite)) throw runaway()
    history.push(cycle)
  }
  const deviation = history.map(({ meanOutput }) => meanOutput - design.output.voltage)
  const period = 1 / design.switchingFrequency
  const pick = (key: keyof Cycle) => history.map((cycle) => cycle[key])
  return {
    map,
    loopWithRipple: loopWithRipple(design, closed, network),
    disturbedAt: BEFORE * period,
    time: history.map((_, k) => (k + 0.5) * period),
    meanOutput: pick('meanOutput'),
    lowestOutput: pick('lowestOutput'),
    highestOutput: pick('highestOutput'),
    peakCurrent: pick('peakCurrent'),
    control: pick('control'),
    duty: pick('duty'),
    readings: readTransient(deviation, pick('duty'), BEFORE, period),
    prediction,
  }
}

function runPeriod(simulator: Simulator, inputs: ReturnType<Plan['inputs']>): Cycle {
  try {
    return simulator.run(inputs)
  } catch (cause) {
    if (cause instanceof RangeError) throw runaway()
    throw cause
  }
}

function planOf(design: DesignDocument, options: SimulationOptions): Plan {
  const { line, output, switchingFrequency } = design
  const { scenario } = options
  const lineVoltage = options.lineVoltage ?? line.nominal
  const outputCurrent = options.outputCurrent ?? output.currentMaximum
  const steady = { line: lineVoltage, extraLoad: 0, target: output.voltage }
  const base = { lineVoltage, outputCurrent, fromRest: false, cycles: 200, step: null }
  switch (scenario.kind) {
    case 'load-step': {
      const half = (output.currentMaximum - output.currentMinimum) / 2 || output.currentMaximum / 2
      const from = scenario.from ?? output.currentMaximum - half
      const size = (scenario.to ?? output.currentMaximum) - from
      if (!(from > 0)) throw badScenario('from', 'The load before the step must be above zero.')
      return {
        ...base,
        outputCurrent: from,
        inputs: (k) => (k < BEFORE ? steady : { ...steady, extraLoad: size }),
        step: { input: 1, size },
      }
    }
    case 'line-step': {
      const from = scenario.from ?? line.minimum
      const to = scenario.to ?? (line.maximum > line.minimum ? line.maximum : 1.1 * from)
      return {
        ...base,
        lineVoltage: from,
        inputs: (k) => ({ ...steady, line: k < BEFORE ? from : to }),
        step: { input: 0, size: to - from },
      }
    }
    case 'soft-start': {
      const rise = Math.max(10, Math.round((scenario.rise ?? 400 / switchingFrequency) * switchingFrequency))
      return {
        ...base,
        fromRest: true,
        cycles: Math.round(2.5 * rise),
        inputs: (k) => ({ ...steady, target: output.voltage * Math.min(1, Math.max(0, (k - BEFORE) / rise)) }),
      }
    }
    case 'overload': {
      const during = scenario.cycles ?? 200
      const extra = (scenario.current ?? 2 * output.currentMaximum) - outputCurrent
      return {
        ...base,
        cycles: during + 400,
        inputs: (k) => (k >= BEFORE && k < BEFORE + during ? { ...steady, extraLoad: extra } : steady),
      }
    }
  }
}

/** Limits of the document; where it has none, what the modulator can use and a half more. */
function limitsOf(design: DesignDocument, { circuit }: ClosedOrbit): Limits {
  const { modulator, amplifier } = design
  const full = modulator.kind === 'voltage-mode' ? modulator.rampAmplitude : 2 * circuit.inputs[BIAS]!
  const given = amplifier.outputLimits
  return {
    control: { low: given?.minimum ?? 0, high: Math.max(given?.maximum ?? 1.5 * full, 1.01 * circuit.inputs[BIAS]!) },
    duty: design.dutyLimit,
  }
}

/**
 * Everything discharged, the amplifier at its lower limit with its capacitors as they stand after a long time there: the
 * state in which a constant error holds its output at that level.
 */
function atRest({ circuit }: ClosedOrbit, powerStates: number, limits: Limits): Float64Array {
  const m = circuit.states.length - powerStates
  // A trace of leakage gives an ideal integrator one such state too.
  const own = circuit.on.A.slice(powerStates).map((row, i) =>
    row.slice(powerStates).map((value, j) => (i === j ? value - LEAKAGE : value)),
  )
  const drive = Float64Array.from(circuit.on.B.slice(powerStates), (row) => row[TARGET]!)
  const start = new Float64Array(circuit.states.length)
  if (!solveReal(flatten(own), m, drive, 1)) return start
  const rows = circuit.control.overStates.slice(powerStates)
  const share = (limits.control.low - circuit.inputs[BIAS]!) / dot(rows, drive)
  start.set(
    drive.map((value) => value * share),
    powerStates,
  )
  return start
}

/** Long enough for the slowest closed-loop pole that the averaged model knows, within reason. */
function settlingCycles(plant: OpenPlant, network: Network): number {
  const { A } = closeLoop(plant.model, networkStateSpace(network))
  const slowest = eigenvalues(A).reduce((least, { re }) => (re < 0 ? Math.min(least, -re) : least), Infinity)
  const cycles = Math.ceil((6 / slowest) * plant.circuit.design.switchingFrequency)
  return Math.min(3000, Math.max(200, cycles || 0))
}

/** What the averaged model expects of the same step; null where its closed loop does not settle. */
function predictionOf(
  plant: OpenPlant,
  network: Network,
  { input, size }: NonNullable<Plan['step']>,
): StepResponse | null {
  const system = closeLoop(plant.model, networkStateSpace(network))
  if (eigenvalues(system.A).some(({ re }) => re >= 0)) return null
  return stepResponse(system, input, size, 10 * plant.circuit.period)
}

/**
 * The loop gain that an analyser reads on the running converter, ripple at the comparator and its sidebands included:
 * with Y the output's answer to an injection in front of the comparator, T = G·Y/(1 − G·Y).
 */
function loopWithRipple(design: DesignDocument, { circuit, orbit, firesEarly }: ClosedOrbit, network: Network) {
  const frequencies = defaultFrequencies(design.switchingFrequency, LOOP_FREQUENCIES)
  if (firesEarly) return null
  const respond = switchedResponses(circuit, orbit)
  const gains = frequencies.map((frequency) => {
    const omega = 2 * Math.PI * frequency
    const around = multiply(respond(omega).controlToOutput, networkGain(network, omega))
    return divide(around, complex(1 - around.re, -around.im))
  })
  return { frequencies, response: curve(gains) }
}

const badScenario = (field: string, message: string): DesignError =>
  DesignError.at('invalid-document', `scenario.${field}`, message)

const runaway = (): DesignError =>
  DesignError.at(
    'no-operating-point',
    'compensator',
    'The simulated loop runs away: currents or voltages leave the range of numbers. Look at the margins first.',
  )

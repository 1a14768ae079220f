/** From one set of part values to its margins, by either model. */
import { closeLoop } from '../loop/closedLoop'
import { fittedNetwork } from '../compensators/fitted'
import { buildNetwork, networkGain, networkStateSpace, type Network } from '../compensators/networks'
import { buildCircuit, type Circuit } from '../circuit'
import type { DesignDocument } from '../document'
import { DesignError } from '../errors'
import type { LoopGain } from '../loop/margins'
import type { Complex } from '../numeric/complex'
import { eigenvalues } from '../numeric/eigen'
import type { MarginSummary } from '../results'
import { eventsOf } from '../switched/events'
import { findContinuousOrbit, findOrbit } from '../switched/orbit'
import { periodMatrix } from '../switched/periodMap'
import { switchedResponses } from '../switched/response'
import { AVERAGED_MEASURES, averagedPoint, type AveragedPoint } from './averagedPoint'
import { circuitFamily } from './circuitFamily'
import { marginReader, type LoopShape } from './fastMargins'
import type { SpreadModel } from './options'
import { controlToOutput, type ResponseInto } from './plantResponse'
import type { Sample } from './variation'

export interface Evaluation {
  readonly conduction: 'continuous' | 'discontinuous'
  /** False where conduction stops in a topology for which that is only detected. */
  readonly isModelled: boolean
  readonly dutyCycle: number
  readonly margins: MarginSummary
  /** This and the poles hold as long as the sample does. */
  readonly loopGain: LoopGain
  /** rad/s, of the averaged model with its network. */
  readonly closedLoopPoles: () => Complex[]
}

export interface Refusal {
  readonly refused: DesignError
}

export type Evaluator = (sample: Sample) => Evaluation | Refusal

/**
 * @param base - the design about which the samples lie; nominal line and full load must be reachable.
 * @throws DesignError where that is not so, or the design has no network.
 */
export function evaluatorFor(base: DesignDocument, model: SpreadModel): Evaluator {
  requireNetwork(base)
  const { line, output, switchingFrequency } = base
  const centre = buildCircuit(base, line.nominal, output.currentMaximum)
  const member = circuitFamily(centre, model === 'averaged' ? AVERAGED_MEASURES : undefined)
  const readMargins = marginReader(switchingFrequency)
  const guess = continuousDuty(centre)
  const open = model === 'averaged' ? openAveraged : openSwitched
  return function evaluate({ design, point }) {
    try {
      const circuit = member(design, point)
      const network = buildNetwork(design, design.compensator!)
      const { conduction, dutyCycle, respond, shape } = open(circuit, guess)
      const loopInto = times(respond, network)
      return {
        conduction,
        dutyCycle,
        isModelled: conduction === 'continuous' || circuit.canStop,
        margins: readMargins(loopInto, shape),
        loopGain: asComplex(loopInto),
        closedLoopPoles: () => {
          const { model: linear } = averagedPoint(circuit, guess)
          return eigenvalues(closeLoop(linear, networkStateSpace(network)).A)
        },
      }
    } catch (cause) {
      if (cause instanceof DesignError) return { refused: cause }
      if (cause instanceof RangeError) return { refused: outOfRange(point) }
      throw cause
    }
  }
}

/** From where the averaged search starts, which always passes through continuous conduction. */
function continuousDuty(circuit: Circuit): number {
  const orbit = findContinuousOrbit(circuit)
  return orbit instanceof DesignError ? findOrbit(circuit).dutyCycle : orbit.dutyCycle
}

export function requireNetwork(design: DesignDocument): Network {
  const network = fittedNetwork(design)
  if (network) return network
  throw DesignError.at(
    'invalid-compensator',
    'compensator',
    'The spread of the loop needs a compensator; propose or enter one first.',
  )
}

const outOfRange = ({ lineVoltage, outputCurrent }: Sample['point']): DesignError =>
  new DesignError(
    'no-operating-point',
    `At ${lineVoltage} V and ${outputCurrent} A the figures leave the range of numbers: some part is far from all others in size.`,
    [],
  )

/** T(jω), written out: this runs some seventy times in every sample. */
const times =
  (respond: ResponseInto, network: Network): ResponseInto =>
  (omega, out) => {
    respond(omega, out)
    const { re, im } = networkGain(network, omega)
    const plantRe = out[0]!
    const plantIm = out[1]!
    out[0] = plantRe * re - plantIm * im
    out[1] = plantRe * im + plantIm * re
  }

function asComplex(respond: ResponseInto): LoopGain {
  const out = new Float64Array(2)
  return (omega) => {
    respond(omega, out)
    return { re: out[0]!, im: out[1]! }
  }
}

interface Opened extends Pick<Evaluation, 'conduction' | 'dutyCycle'> {
  readonly respond: ResponseInto
  readonly shape: LoopShape
}

function openAveraged(circuit: Circuit, guess: number): Opened {
  const { conduction, dutyCycle, model }: AveragedPoint = averagedPoint(circuit, guess)
  return { conduction, dutyCycle, respond: controlToOutput(model), shape: shapeOf(eigenvalues(model.A)) }
}

function openSwitched(circuit: Circuit): Opened {
  const orbit = findOrbit(circuit)
  const responses = switchedResponses(circuit, orbit)
  const multipliers = eigenvalues(periodMatrix(orbit, eventsOf(circuit, orbit)))
  // At standstill itself the exact response is not defined; a millionth of the lowest frequency stands for it.
  const lowest = 1e-12 / circuit.period
  return {
    conduction: orbit.conduction,
    dutyCycle: orbit.dutyCycle,
    respond: (omega, out) => {
      const { re, im } = responses(Math.max(omega, lowest)).controlToOutput
      out[0] = re
      out[1] = im
    },
    // λ = e^{sT} gives the poles that the multipliers are samples of.
    shape: shapeOf(
      multipliers
        .filter(({ re, im }) => re !== 0 || im !== 0)
        .map(({ re, im }) => ({
          re: Math.log(Math.hypot(re, im)) / circuit.period,
          im: Math.atan2(im, re) / circuit.period,
        })),
    ),
  }
}

/** Poles with a Q above two bend the curve sharply. */
function shapeOf(poles: readonly Complex[]): LoopShape {
  const landmarks: number[] = []
  let unstablePoles = 0
  for (const { re, im } of poles) {
    const size = Math.hypot(re, im)
    if (re > 1e-9 * size) unstablePoles++
    if (im > 0 && size > 4 * Math.abs(re)) landmarks.push(size / (2 * Math.PI))
  }
  return { landmarks, unstablePoles }
}

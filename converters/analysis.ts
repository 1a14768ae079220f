/** Everything about one design at one operating point. */
import { closedForms } from './closedForms'
import { networkGain, networkRoots, networkStateSpace, type Network } from './compensators/networks'
import { fittedNetwork } from './compensators/fitted'
import type { DesignDocument, OperatingPointRequest } from './document'
import { invalid } from './parse'
import { complex, divide, multiply, type Complex } from './numeric/complex'
import { eigenvalues } from './numeric/eigen'
import { innerCurrentLoop } from './switched/innerLoop'
import { describeOperatingPoint } from './operatingPoint'
import { openPlant, rightHalfPlaneZero, type OpenPlant, type PlantPoint } from './plant'
import { closeLoop, type ClosedLoopSystem } from './loop/closedLoop'
import { readMargins } from './loop/margins'
import { stepResponse } from './loop/stepResponse'
import { closedLoopMap } from './simulation/closedOrbit'
import { describeNetworkRoots } from './loop/networkRoles'
import { curve, defaultFrequencies } from './responseCurve'
import { describeRoots } from './roots'
import { checkInputFilter } from './inputFilter'
import type { Analysis, Loop, Margins, ModelPair } from './results'
import { ENGINE_VERSION } from './version'
import { warningsFor } from './warnings'

export interface AnalysisOptions {
  readonly operatingPoint?: OperatingPointRequest | undefined
  /** Hz; 400 from 10 Hz to half the switching frequency unless given. */
  readonly frequencies?: readonly number[] | undefined
}

const MOST_FREQUENCIES = 2000
const DEFAULT_FREQUENCIES = 400

export function analyseDesign(design: DesignDocument, options: AnalysisOptions = {}): Analysis {
  const point = operatingPointOf(design, options.operatingPoint)
  const frequencies = checkedFrequencies(design, options.frequencies)
  const network = fittedNetwork(design)
  const plant = openPlant(design, point)
  const operatingPoint = describeOperatingPoint(plant.circuit, plant.orbit)
  const raw = rawResponses(plant, frequencies)
  const responses = {
    controlToOutput: mapPair(raw.controlToOutput, curve),
    lineToOutput: mapPair(raw.lineToOutput, curve),
    outputImpedance: mapPair(raw.outputImpedance, curve),
  }
  const closed = network && closeLoop(plant.model, networkStateSpace(network))
  const loop = network && closed && describeLoop(plant, network, closed, frequencies, raw)
  const margins = network && marginsOf(plant, network, 'switched')
  const averagedMargins = network && marginsOf(plant, network, 'averaged')
  // The steps come from the averaged model, so it has to settle too.
  const settles = plant.periodMap.isStable && loop?.closedLoopPoles.every((pole) => pole.halfPlane === 'left')
  const analysis: Omit<Analysis, 'warnings'> = {
    engineVersion: ENGINE_VERSION,
    operatingPoint,
    periodMap: plant.periodMap,
    plant: { poles: plant.poles, zeros: plant.zeros, closedForms: closedForms(plant) },
    frequencies,
    responses,
    inputFilter: checkInputFilter(design, point, network),
    innerCurrentLoop:
      design.modulator.kind === 'peak-current-mode'
        ? curve(frequencies.map(inHertz(innerCurrentLoop(plant.circuit, plant.orbit))))
        : null,
    loop,
    margins,
    averagedMargins,
    steps: closed && settles && margins?.isStable ? stepsOf(design, closed) : null,
  }
  return { ...analysis, warnings: warningsFor(design, analysis, rightHalfPlaneZero(plant.zeros)) }
}

/** Nominal line and full load where nothing else is asked for. */
export function operatingPointOf(design: DesignDocument, request: OperatingPointRequest = {}): PlantPoint {
  return {
    lineVoltage: request.lineVoltage ?? design.line.nominal,
    outputCurrent: request.outputCurrent ?? design.output.currentMaximum,
  }
}

export function checkedFrequencies(design: DesignDocument, asked: readonly number[] | undefined): number[] {
  if (asked === undefined) return defaultFrequencies(design.switchingFrequency, DEFAULT_FREQUENCIES)
  const most = 10 * design.switchingFrequency
  if (asked.length === 0 || asked.length > MOST_FREQUENCIES) {
    throw invalid([
      { field: 'frequencies', message: `Give 1 to ${MOST_FREQUENCIES} frequencies; there are ${asked.length}.` },
    ])
  }
  const bad = asked.findIndex((f) => typeof f !== 'number' || !(f > 0 && f <= most))
  if (bad >= 0) {
    throw invalid([
      {
        field: `frequencies[${bad}]`,
        message: `Must be a number above 0 Hz and at most ten times the switching frequency, ${most} Hz.`,
      },
    ])
  }
  return [...asked]
}

const inHertz =
  <T>(respond: (omega: number) => T) =>
  (frequency: number): T =>
    respond(2 * Math.PI * frequency)

type RawResponses = Record<'controlToOutput' | 'lineToOutput' | 'outputImpedance', ModelPair<Complex[]>>

function rawResponses(plant: OpenPlant, frequencies: readonly number[]): RawResponses {
  const averaged = frequencies.map(inHertz(plant.averaged))
  const switched = frequencies.map(inHertz(plant.switched))
  const pick = (key: keyof RawResponses) => ({
    averaged: averaged.map((answers) => answers[key]),
    switched: switched.map((answers) => answers[key]),
  })
  return {
    controlToOutput: pick('controlToOutput'),
    lineToOutput: pick('lineToOutput'),
    outputImpedance: pick('outputImpedance'),
  }
}

const mapPair = <T, U>(pair: ModelPair<T>, f: (value: T) => U): ModelPair<U> => ({
  averaged: f(pair.averaged),
  switched: f(pair.switched),
})

function describeLoop(
  plant: OpenPlant,
  network: Network,
  closed: ClosedLoopSystem,
  frequencies: readonly number[],
  raw: RawResponses,
): Loop {
  const gains = frequencies.map((f) => networkGain(network, 2 * Math.PI * f))
  const loopGains = mapPair(raw.controlToOutput, (values) => values.map((value, i) => multiply(value, gains[i]!)))
  /** What feedback leaves of a disturbance: value/(1 + T). */
  const suppressed = (pair: ModelPair<Complex[]>) => ({
    averaged: curve(pair.averaged.map((value, i) => divide(value, onePlus(loopGains.averaged[i]!)))),
    switched: curve(pair.switched.map((value, i) => divide(value, onePlus(loopGains.switched[i]!)))),
  })
  const { poles, zeros } = networkRoots(network)
  return {
    response: mapPair(loopGains, curve),
    compensator: curve(gains),
    ...describeNetworkRoots(network, poles, zeros),
    closedLoopPoles: describeRoots(eigenvalues(closed.A), () => 'loop'),
    periodMap: closedLoopMap(plant.circuit, plant.orbit, network),
    closedLoop: { lineToOutput: suppressed(raw.lineToOutput), outputImpedance: suppressed(raw.outputImpedance) },
  }
}

const onePlus = (value: Complex): Complex => complex(1 + value.re, value.im)

/** Margins of the loop that a network makes with a plant, from either model. */
export function marginsOf(plant: OpenPlant, network: Network, model: 'switched' | 'averaged'): Margins {
  const respond = plant[model]
  const loopGain = (omega: number) => multiply(respond(omega).controlToOutput, networkGain(network, omega))
  return readMargins(loopGain, plant.circuit.design.switchingFrequency, {
    landmarks: plant.poles
      .filter((pole) => pole.imaginary > 0 && (pole.quality ?? 0) > 2)
      .map((pole) => pole.frequency),
    unstablePoles: plant.poles.filter((pole) => pole.halfPlane === 'right').length,
  })
}

/** Half of the load's range and of the line's, or a tenth of full load and nominal line where there is no range. */
function stepsOf(design: DesignDocument, closed: ClosedLoopSystem): NonNullable<Analysis['steps']> {
  const { output, line, switchingFrequency } = design
  const load = (output.currentMaximum - output.currentMinimum) / 2 || output.currentMaximum / 10
  const lineStep = (line.maximum - line.minimum) / 2 || line.nominal / 10
  const shortest = 10 / switchingFrequency
  return { load: stepResponse(closed, 1, load, shortest), line: stepResponse(closed, 0, lineStep, shortest) }
}

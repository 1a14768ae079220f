/** The power stage at one operating point, opened for everything that is asked of it. */
import { averageStage, voltageModeModel, type AveragedStage } from './averaged/continuous'
import { currentModeModel } from './averaged/currentMode'
import { discontinuousModel } from './averaged/discontinuous'
import { column, CONTROL, modelResponses, type LinearModel } from './averaged/linearModel'
import { buildCircuit, type Circuit } from './circuit'
import type { DesignDocument } from './document'
import { DesignError } from './errors'
import type { Complex } from './numeric/complex'
import { eigenvalues, invariantZeros } from './numeric/eigen'
import type { PeriodMap, Root, RootRole } from './results'
import { describeRoots } from './roots'
import { findOrbit, type Orbit } from './switched/orbit'
import { periodMap } from './switched/periodMap'
import { switchedResponses, type SwitchedResponses } from './switched/response'

export interface PlantPoint {
  readonly lineVoltage: number // V
  readonly outputCurrent: number // A
}

export interface OpenPlant {
  readonly circuit: Circuit
  readonly orbit: Orbit
  /** Rest point of the averaged circuit; null in discontinuous conduction. */
  readonly stage: AveragedStage | null
  readonly model: LinearModel
  readonly poles: readonly Root[]
  readonly zeros: readonly Root[]
  readonly periodMap: PeriodMap
  readonly switched: (omega: number) => SwitchedResponses
  readonly averaged: (omega: number) => SwitchedResponses
}

/** @throws DesignError when the point cannot be reached or computed. */
export function openPlant(design: DesignDocument, point: PlantPoint): OpenPlant {
  try {
    return open(design, point)
  } catch (cause) {
    if (!(cause instanceof RangeError)) throw cause
    throw new DesignError(
      'no-operating-point',
      `At ${point.lineVoltage} V and ${point.outputCurrent} A the figures leave the range of numbers: some part is far from all others in size.`,
      [],
    )
  }
}

function open(design: DesignDocument, point: PlantPoint): OpenPlant {
  const circuit = buildCircuit(design, point.lineVoltage, point.outputCurrent)
  const orbit = findOrbit(circuit)
  const stage = orbit.segments.length === 2 ? averageStage(circuit, orbit.dutyCycle) : null
  const model = averagedModel(circuit, orbit, stage)
  const poles = eigenvalues(model.A)
  const zeros = invariantZeros(model.A, column(model.B, CONTROL), model.C, model.D[CONTROL]!)
  const isCurrentMode = design.modulator.kind === 'peak-current-mode'
  return {
    circuit,
    orbit,
    stage,
    model,
    poles: describeRoots(poles, poleRoles(circuit, poles, stage !== null, isCurrentMode)),
    zeros: describeRoots(zeros, (zero) =>
      zero.re > 0 ? 'right-half-plane-zero' : zero.im !== 0 ? 'coupling' : 'capacitor-esr',
    ),
    periodMap: periodMap(circuit, orbit),
    switched: switchedResponses(circuit, orbit),
    averaged: modelResponses(model),
  }
}

function averagedModel(circuit: Circuit, orbit: Orbit, stage: AveragedStage | null): LinearModel {
  const { modulator } = circuit.design
  if (!stage) return discontinuousModel(circuit, orbit.dutyCycle, meanState(circuit, orbit))
  if (modulator.kind === 'voltage-mode') return voltageModeModel(stage, modulator.rampAmplitude)
  return currentModeModel(circuit, stage, orbit.dutyCycle)
}

/** Mean of each state over the orbit, ramps taken as straight. */
function meanState(circuit: Circuit, orbit: Orbit): Float64Array {
  return Float64Array.from(circuit.states, (_, i) =>
    orbit.segments.reduce((sum, segment, k) => {
      const stands = k === 2 && i === circuit.stoppingState
      const middle = stands ? 0 : (segment.start[i]! + segment.end[i]!) / 2
      return sum + (middle * segment.duration) / circuit.period
    }, 0),
  )
}

/**
 * Where each pole comes from. A capacitor behind its ESR has a pole near 1/(2π·ESR·C) only when another, better bank
 * holds the output; the fast real pole of several banks is theirs.
 */
function poleRoles(
  circuit: Circuit,
  poles: readonly Complex[],
  isContinuous: boolean,
  isCurrentMode: boolean,
): (pole: Complex) => RootRole {
  const filterRole = filterPoles(circuit, poles)
  const half = Math.PI / circuit.period
  const size = (pole: Complex) => Math.hypot(pole.re, pole.im)
  const sorted = poles.filter((pole) => !filterRole.includes(pole)).sort((a, b) => size(a) - size(b))
  if (isContinuous && !isCurrentMode) {
    const pairs = sorted.filter((pole) => pole.im !== 0)
    const filter = pairs.length > 0 ? pairs.slice(0, 2) : sorted.slice(0, 2)
    return (pole) =>
      filterRole.includes(pole)
        ? 'input-filter'
        : filter.includes(pole)
          ? 'output-filter'
          : pairs.includes(pole)
            ? 'coupling'
            : 'capacitor-esr'
  }
  const fast = isContinuous
    ? // The pair at half the switching frequency, or the two real poles into which a steep ramp splits it.
      [...sorted].sort((a, b) => distanceToPair(a, half) - distanceToPair(b, half)).slice(0, 2)
    : sorted.slice(-1)
  return (pole) => {
    if (filterRole.includes(pole)) return 'input-filter'
    if (fast.includes(pole)) return isContinuous ? 'sampling' : 'inductor'
    if (pole.im !== 0) return 'coupling'
    return pole === sorted[0] ? 'load-capacitor' : 'capacitor-esr'
  }
}

/** Poles that the input filter adds: the pair nearest to its own resonance, and a real one for its damping branch. */
function filterPoles({ design: { inputFilter }, states }: Circuit, poles: readonly Complex[]): Complex[] {
  if (!inputFilter) return []
  const natural = 1 / Math.sqrt(inputFilter.inductance * inputFilter.capacitance)
  const count = states.filter((state) => state.startsWith('filter')).length
  const nearest = [...poles].sort((a, b) => distanceToPair(a, natural) - distanceToPair(b, natural))
  // The rest are real: half of another pair is never the filter's.
  const real = nearest.slice(2).filter((pole) => pole.im === 0)
  return [...nearest.slice(0, 2), ...real.slice(0, Math.max(0, count - 2))]
}

/** How far a pole is from a frequency (rad/s), in octaves; complex poles come first. */
const distanceToPair = (pole: Complex, omega: number): number =>
  Math.abs(Math.log2(Math.hypot(pole.re, pole.im) / omega)) - (pole.im !== 0 ? 100 : 0)

/** Lowest zero in the right half plane, Hz; null if there is none. */
export function rightHalfPlaneZero(zeros: readonly Root[]): number | null {
  const found = zeros.filter((zero) => zero.halfPlane === 'right').map((zero) => zero.frequency)
  return found.length > 0 ? Math.min(...found) : null
}

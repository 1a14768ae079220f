/** What the rest of the product may use of the engine. Every function takes unchecked input and names what is wrong. */
import { analyseDesign, operatingPointOf, type AnalysisOptions } from './analysis'
import { cornersOf, type CornerOptions } from './corners'
import { invalid, parseDesign, problemsOf } from './parse'
import { simulateLoop } from './simulation/simulate'
import { SimulationOptions, type SimulationOptionsInput } from './simulation/scenario'
import { rootLocusOf } from './loop/rootLocus'
import type { OperatingPointRequest } from './document'
import type { Analysis, CornerSet, RootLocus, Simulation } from './results'

/** Operating point, poles and zeros, responses, loop, margins and step responses at one line voltage and load. */
export function analyse(design: unknown, options: AnalysisOptions = {}): Analysis {
  return analyseDesign(parseDesign(design), options)
}

/** The loop at every corner of line and load. */
export function analyseCorners(design: unknown, options: CornerOptions = {}): CornerSet {
  return cornersOf(parseDesign(design), options)
}

export { proposeCompensator } from './compensators/propose'
export { proposeStage } from './quickStart'
/** Where the closed-loop poles go as the loop gain is scaled. */
export function analyseRootLocus(design: unknown, point: OperatingPointRequest = {}): RootLocus {
  const document = parseDesign(design)
  return rootLocusOf(document, operatingPointOf(document, point))
}

/** The closed loop cycle by cycle through one scenario, with its period map and the loop gain that includes ripple. */
export function simulate(design: unknown, options: SimulationOptionsInput = {}): Simulation {
  const document = parseDesign(design)
  const checked = SimulationOptions.safeParse(options)
  if (!checked.success) throw invalid(problemsOf(checked.error))
  return simulateLoop(document, checked.data)
}

export { analyseToleranceCorners, mergeSummaries, presentSummary, runSpread, startRun } from './spread'
export { ENGINE_VERSION } from './version'
export { DesignError, type DesignErrorCode, type FieldProblem } from './errors'
export * from './document'
export type * from './results'
export type { RunPart, SpreadRun, SpreadSummary } from './spread'
export type * from './spread/results'
export type { AnalysisOptions, CornerOptions }

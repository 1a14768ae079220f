/** What the rest of the product may use of the engine. Every function takes unchecked input and names what is wrong. */
import { analyseDesign, type AnalysisOptions } from './analysis'
import { cornersOf, type CornerOptions } from './corners'
import { parseDesign } from './parse'
import type { Analysis, CornerSet } from './results'

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
export { ENGINE_VERSION } from './version'
export { DesignError, type DesignErrorCode, type FieldProblem } from './errors'
export * from './document'
export type * from './results'
export type { AnalysisOptions, CornerOptions }

/** The spread as the rest of the product uses it. Every function takes unchecked input and names what is wrong. */
import type { z } from 'zod'
import { DesignError } from '../errors'
import { invalid, parseDesign, problemsOf } from '../parse'
import { SpreadOptions, ToleranceCornerOptions } from './options'
import type { SpreadResult, ToleranceCornerSet } from './results'
import { startSpread, type RunPart, type SpreadRun } from './statistics'
import { toleranceCorners } from './toleranceCorners'

/** The loop at every combination of line, load and tolerance ends. */
export function analyseToleranceCorners(design: unknown, options: unknown = {}): ToleranceCornerSet {
  return toleranceCorners(parseDesign(design), parseOptions(ToleranceCornerOptions, options))
}

/** A statistical run, to be done block by block; several workers take a part each and `mergeSummaries` joins them. */
export function startRun(design: unknown, options: unknown = {}, part: RunPart = { index: 0, of: 1 }): SpreadRun {
  return startSpread(parseDesign(design), parseOptions(SpreadOptions, options), checkedPart(part))
}

/** The whole of a statistical run at once. */
export function runSpread(design: unknown, options: unknown = {}): SpreadResult {
  const run = startRun(design, options)
  run.next(Infinity)
  return run.snapshot()
}

function parseOptions<T extends z.ZodType>(schema: T, options: unknown): z.infer<T> {
  const result = schema.safeParse(options)
  if (result.success) return result.data
  throw invalid(problemsOf(result.error))
}

function checkedPart(part: RunPart): RunPart {
  const { index, of } = part
  if (Number.isInteger(of) && Number.isInteger(index) && index >= 0 && index < of) return part
  throw DesignError.at('invalid-document', 'part', `There is no part ${index} of ${of}.`)
}

export { presentSummary } from './presentation'
export { mergeSummaries, type SpreadSummary } from './summary'
export {
  MOST_CORNERS,
  MOST_SAMPLES,
  SPREAD_GROUPS,
  SPREAD_MODELS,
  SpreadOptions,
  ToleranceCornerOptions,
} from './options'
export type { SpreadOptionsInput, ToleranceCornerOptionsInput, SpreadGroup, SpreadModel } from './options'
export type { RunPart, SpreadRun } from './statistics'
export type * from './results'

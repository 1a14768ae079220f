/** The loop at every combination of line, load and tolerance ends. */
import type { DesignDocument } from '../document'
import { evaluatorFor, type Evaluation, type Refusal } from './evaluation'
import { mergeFailures, withFailure } from './failures'
import { appliedTargets, slackOf } from './judging'
import type { ToleranceCornerOptions } from './options'
import type { AppliedTargets, SpreadFailure, ToleranceCorner, ToleranceCornerSet } from './results'
import { conditioned, sampleAt, variablesOf, type Variable } from './variation'

interface RankedVariable {
  readonly variable: Variable
  readonly influence: number
}

/**
 * Full factorial over line, load and as many tolerances as stay within `mostCorners`, the most influential first; the
 * others keep their nominal value, and the note says so. Nominal comes first.
 * @throws DesignError where nominal line and full load cannot be computed, or the design has no network.
 */
export function toleranceCorners(document: DesignDocument, options: ToleranceCornerOptions): ToleranceCornerSet {
  const design = conditioned(document, options.conditions)
  const targets = appliedTargets(document, options.targets)
  const variables = variablesOf(design, options.vary)
  const evaluate = evaluatorFor(design, options.model)
  const range = variables.filter(isRange)
  const ranked = rankByInfluence(
    design,
    range,
    variables.filter((variable) => !isRange(variable)),
    targets,
  )
  const combined = Math.max(0, Math.min(ranked.length, Math.floor(Math.log2(options.mostCorners)) - range.length))
  const order = [...range, ...ranked.map(({ variable }) => variable)]
  const judged = valueSets(order, range.length + combined).map((values) => {
    const sample = sampleAt(design, order, values)
    return { values, sample, found: evaluate(sample) }
  })
  const corners = judged.flatMap(({ values, sample, found }) =>
    'refused' in found ? [] : [{ ...sample.point, ...cornerOf(found, targets), values }],
  )
  return {
    model: options.model,
    targets,
    quantities: order.map(({ set: _set, ...quantity }, i) => ({
      ...quantity,
      influence: ranked[i - range.length]?.influence ?? 0,
      isCombined: i < range.length + combined,
    })),
    corners,
    failures: failuresOf(judged),
    worst: corners.reduce<ToleranceCorner | null>(
      (least, corner) => (least === null || corner.slack < least.slack ? corner : least),
      null,
    ),
    note: noteOn(ranked.slice(combined)),
  }
}

const isRange = ({ group }: Variable): boolean => group === 'line' || group === 'load'

function cornerOf({ conduction, dutyCycle, margins }: Evaluation, targets: AppliedTargets) {
  return { conduction, dutyCycle, margins, slack: slackOf(margins, targets) }
}

function failuresOf(judged: readonly { readonly values: readonly number[]; readonly found: Evaluation | Refusal }[]) {
  const failures = judged.flatMap(({ values, found }): SpreadFailure[] =>
    'refused' in found ? withFailure([], found.refused, values) : [],
  )
  return mergeFailures(failures)
}

/**
 * Each tolerance alone at both ends, by the averaged model, where line and load are worst before tolerances: how far the
 * slack moves between the ends. A loop lost at an end has moved farthest.
 */
function rankByInfluence(
  design: DesignDocument,
  range: readonly Variable[],
  tolerances: readonly Variable[],
  targets: AppliedTargets,
): RankedVariable[] {
  const evaluate = evaluatorFor(design, 'averaged')
  const slackAt = (variables: readonly Variable[], values: readonly number[]): number => {
    const found = evaluate(sampleAt(design, variables, values))
    return 'refused' in found ? LOST : slackOf(found.margins, targets)
  }
  const worst = valueSets(range, range.length).reduce((least, values) =>
    slackAt(range, values) < slackAt(range, least) ? values : least,
  )
  return tolerances
    .map((variable) => {
      const ends = [variable.low, variable.high].map((value) => slackAt([...range, variable], [...worst, value]))
      return { variable, influence: Math.abs(ends[1]! - ends[0]!) }
    })
    .sort((a, b) => b.influence - a.influence)
}

/** Slack of a point that cannot be reached at all. */
const LOST = -3

/** Nominal values, then every combination of ends of the first `combined` variables with the others at nominal. */
function valueSets(variables: readonly Variable[], combined: number): number[][] {
  const nominal = variables.map((variable) => variable.nominal)
  const combinations = Array.from({ length: combined === 0 ? 0 : 2 ** combined }, (_, bits) =>
    variables.map((variable, i) => (i >= combined ? variable.nominal : (bits >> i) & 1 ? variable.high : variable.low)),
  )
  return [nominal, ...combinations]
}

function noteOn(left: readonly RankedVariable[]): string | null {
  if (left.length === 0) return null
  const names = left.map(({ variable }) => variable.label)
  const list = names.length === 1 ? names[0]! : `${names.slice(0, -1).join(', ')} and ${names.at(-1)!}`
  return `Left at nominal to keep the number of corners down, as those that move the margins least one by one: ${list}.`
}

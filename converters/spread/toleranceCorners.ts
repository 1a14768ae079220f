/** The loop at every combination of line, load and tolerance ends. */
import type { DesignDocument } from '../document'
import type { MarginSummary } from '../results'
import { evaluatorFor, type Evaluation, type Refusal } from './evaluation'
import { mergeFailures, withFailure } from './failures'
import { appliedTargets, slackOf } from './judging'
import type { ToleranceCornerOptions } from './options'
import type { AppliedTargets, SpreadFailure, ToleranceCorner, ToleranceCornerSet } from './results'
import { variablesOf, type Variable } from './variables'
import { conditioned, sampleAt, samplerOf } from './variation'

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
  const sample = samplerOf(design, order)
  const judged = valueSets(order, range.length + combined).map((values) => {
    const { design: varied, point } = sample(values)
    return { values, point: { ...point }, found: evaluate({ design: varied, point }) }
  })
  const corners = judged.flatMap(({ values, point, found }) =>
    'refused' in found ? [] : [{ ...point, ...cornerOf(found, targets), values }],
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
 * margins move between the ends, each as a share of its target. A loop that is lost at one end has moved farthest.
 */
function rankByInfluence(
  design: DesignDocument,
  range: readonly Variable[],
  tolerances: readonly Variable[],
  targets: AppliedTargets,
): RankedVariable[] {
  const evaluate = evaluatorFor(design, 'averaged')
  const marginsAt = (variables: readonly Variable[], values: readonly number[]): MarginSummary | null => {
    const found = evaluate(sampleAt(design, variables, values))
    return 'refused' in found ? null : found.margins
  }
  const slackAt = (values: readonly number[]): number => {
    const margins = marginsAt(range, values)
    return margins ? slackOf(margins, targets) : Infinity
  }
  const worst = valueSets(range, range.length).reduce((least, values) =>
    slackAt(values) < slackAt(least) ? values : least,
  )
  return tolerances
    .map((variable) => {
      const low = marginsAt([...range, variable], [...worst, variable.low])
      const high = marginsAt([...range, variable], [...worst, variable.high])
      return { variable, influence: low && high ? distanceBetween(low, high, targets) : LOST }
    })
    .sort((a, b) => b.influence - a.influence)
}

/** Influence of a tolerance at one end of which there is no operating point. */
const LOST = 100

function distanceBetween(low: MarginSummary, high: MarginSummary, targets: AppliedTargets): number {
  const moved = (key: keyof AppliedTargets, least: number) => {
    const [before, after] = [low[key], high[key]]
    return before === null || after === null ? 0 : Math.abs(after - before) / Math.max(targets[key], least)
  }
  return moved('phaseMargin', 1) + moved('gainMargin', 1) + moved('modulusMargin', 0.01)
}

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

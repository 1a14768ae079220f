/** What a statistical run keeps of its samples: enough for every picture, little enough for a hundred thousand of them. */
import { curve } from '../responseCurve'
import type { Complex } from '../numeric/complex'
import type { MarginSummary } from '../results'
import type { Evaluation, Refusal } from './evaluation'
import { mergeFailures, withFailure } from './failures'
import { slackOf, verdictsOf } from './judging'
import type { SpreadModel } from './options'
import { addToSums, emptySums, mergeSums, regressionRow, type RegressionSums } from './regression'
import type { AppliedTargets, PlacedMargins, SpreadFailure, SpreadFigure, VariedQuantity, YieldKey } from './results'
import { addToSobol, emptySobol, mergeSobol, type SobolSums } from './sobol'
import type { Sample } from './variation'

export const FIGURES: readonly SpreadFigure[] = ['crossover', 'phaseMargin', 'gainMargin', 'modulusMargin']
export const YIELD_KEYS: readonly YieldKey[] = [
  'all',
  'reached',
  'stable',
  'phaseMargin',
  'gainMargin',
  'modulusMargin',
]

/** What is the same for all parts of one run. */
export interface SpreadSettings {
  readonly model: SpreadModel
  readonly targets: AppliedTargets
  readonly confidence: number
  readonly quantities: readonly VariedQuantity[]
  /** Hz, of the kept curves. */
  readonly frequencies: readonly number[]
  /** Figures of the nominal design; sums are taken about them to keep their digits. */
  readonly nominal: MarginSummary
}

export interface KeptSample {
  readonly index: number
  readonly gainDb: Float32Array
  readonly phaseDeg: Float32Array
  readonly poles: readonly Complex[]
}

/** Plain data: it crosses from a worker as it is. */
export interface SpreadSummary {
  readonly settings: SpreadSettings
  /** Index of the first sample of this part. */
  readonly from: number
  readonly evaluated: number
  readonly passed: Readonly<Record<YieldKey, number>>
  /** One entry a reached sample, in order; NaN where it has no such figure. */
  readonly columns: Readonly<Record<SpreadFigure, Float64Array>>
  readonly regression: Readonly<Record<SpreadFigure, RegressionSums>>
  readonly sobol: Readonly<Record<SpreadFigure, SobolSums>>
  readonly kept: readonly KeptSample[]
  readonly worst: PlacedMargins | null
  readonly failures: readonly SpreadFailure[]
  readonly conductionNotModelled: number
}

export interface Accumulator {
  readonly add: (
    index: number,
    sample: Sample,
    values: Float64Array,
    found: Evaluation | Refusal,
    keeps: boolean,
  ) => void
  readonly addSobol: (found: readonly (Evaluation | Refusal)[]) => void
  readonly summary: () => SpreadSummary
}

const byFigure = <T>(make: (figure: SpreadFigure) => T): Record<SpreadFigure, T> => ({
  crossover: make('crossover'),
  phaseMargin: make('phaseMargin'),
  gainMargin: make('gainMargin'),
  modulusMargin: make('modulusMargin'),
})

/** @param capacity - the most samples that will be added. */
export function accumulate(settings: SpreadSettings, from: number, capacity: number): Accumulator {
  const { quantities, targets, nominal, frequencies } = settings
  const columns = byFigure(() => new Float64Array(capacity))
  const regression = byFigure(() => emptySums(quantities.length))
  const sobol = byFigure(() => emptySobol(quantities.length))
  const passed: Record<YieldKey, number> = {
    all: 0,
    reached: 0,
    stable: 0,
    phaseMargin: 0,
    gainMargin: 0,
    modulusMargin: 0,
  }
  const kept: KeptSample[] = []
  const row = regressionRow(quantities.length)
  let evaluated = 0
  let worst: PlacedMargins | null = null
  let failures: SpreadFailure[] = []
  let conductionNotModelled = 0

  function add(
    index: number,
    { point }: Sample,
    values: Float64Array,
    found: Evaluation | Refusal,
    keeps: boolean,
  ): void {
    evaluated++
    if ('refused' in found) {
      failures = withFailure(failures, found.refused, values)
      return
    }
    const { margins } = found
    for (let i = 0; i < quantities.length; i++) {
      const { low, high } = quantities[i]!
      row[i + 1] = (2 * values[i]! - high - low) / (high - low)
    }
    for (const figure of FIGURES) {
      columns[figure][passed.reached] = margins[figure] ?? Number.NaN
      const relative = relativeFigure(margins, nominal, figure)
      if (relative === null) continue
      row[quantities.length + 1] = relative
      addToSums(regression[figure], row)
    }
    const verdicts = verdictsOf(margins, targets)
    for (const key of YIELD_KEYS) if (verdicts[key]) passed[key]++
    if (!found.isModelled) conductionNotModelled++
    const slack = slackOf(margins, targets)
    if (worst === null || slack < worst.slack) worst = { ...point, margins, values: Array.from(values), slack }
    if (keeps) kept.push(keptSample(index, found, frequencies))
  }

  function addSobol(found: readonly (Evaluation | Refusal)[]): void {
    for (const figure of FIGURES) {
      const values = found.map((one) => ('refused' in one ? null : relativeFigure(one.margins, nominal, figure)))
      if (values.every((value) => value !== null)) addToSobol(sobol[figure], values)
    }
  }

  function summary(): SpreadSummary {
    return {
      settings,
      from,
      evaluated,
      passed: { ...passed },
      columns: byFigure((figure) => columns[figure].slice(0, passed.reached)),
      regression: byFigure((figure) => mergeSums([regression[figure]])),
      sobol: byFigure((figure) => mergeSobol([sobol[figure]])),
      kept: [...kept],
      worst,
      failures,
      conductionNotModelled,
    }
  }
  return { add, addSobol, summary }
}

/** A figure as its relative distance from nominal, so that its sums neither overflow nor cancel. */
function relativeFigure(margins: MarginSummary, nominal: MarginSummary, figure: SpreadFigure): number | null {
  const value = margins[figure]
  if (value === null) return null
  const centre = nominal[figure] ?? 0
  return (value - centre) / Math.max(Math.abs(centre), 1e-3)
}

function keptSample(
  index: number,
  { loopGain, closedLoopPoles }: Evaluation,
  frequencies: readonly number[],
): KeptSample {
  const points = curve(frequencies.map((frequency) => loopGain(2 * Math.PI * frequency)))
  return {
    index,
    gainDb: Float32Array.from(points, ({ gainDb }) => gainDb),
    phaseDeg: Float32Array.from(points, ({ phaseDeg }) => phaseDeg),
    poles: closedLoopPoles(),
  }
}

/** Puts the parts of one run together, in whatever order they arrive: what one worker would have kept of all samples. */
export function mergeSummaries(parts: readonly [SpreadSummary, ...SpreadSummary[]]): SpreadSummary {
  const ordered = [...parts].sort((a, b) => a.from - b.from)
  const [first] = ordered as [SpreadSummary, ...SpreadSummary[]]
  const total = (read: (part: SpreadSummary) => number) => ordered.reduce((sum, part) => sum + read(part), 0)
  return {
    settings: first.settings,
    from: first.from,
    evaluated: total((part) => part.evaluated),
    passed: {
      all: total(({ passed }) => passed.all),
      reached: total(({ passed }) => passed.reached),
      stable: total(({ passed }) => passed.stable),
      phaseMargin: total(({ passed }) => passed.phaseMargin),
      gainMargin: total(({ passed }) => passed.gainMargin),
      modulusMargin: total(({ passed }) => passed.modulusMargin),
    },
    columns: byFigure((figure) => joined(ordered.map(({ columns }) => columns[figure]))),
    regression: byFigure((figure) => mergeSums(ordered.map(({ regression }) => regression[figure]))),
    sobol: byFigure((figure) => mergeSobol(ordered.map(({ sobol }) => sobol[figure]))),
    kept: ordered.flatMap(({ kept }) => kept),
    worst: ordered.reduce<PlacedMargins | null>(
      (least, { worst }) => (worst && (least === null || worst.slack < least.slack) ? worst : least),
      null,
    ),
    failures: mergeFailures(ordered.flatMap(({ failures }) => failures)),
    conductionNotModelled: total((part) => part.conductionNotModelled),
  }
}

function joined(columns: readonly Float64Array[]): Float64Array {
  const all = new Float64Array(columns.reduce((sum, column) => sum + column.length, 0))
  let at = 0
  for (const column of columns) {
    all.set(column, at)
    at += column.length
  }
  return all
}

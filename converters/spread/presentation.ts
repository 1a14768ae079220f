/** From what a run kept to what is shown of it. */
import type { Complex } from '../numeric/complex'
import { distributionOf, quantileOfSorted } from './distribution'
import { clopperPearson } from './proportion'
import { standardisedFit } from './regression'
import type {
  LoopBands,
  QuantileBand,
  RegressionRanking,
  SobolRanking,
  SpreadResult,
  VariedQuantity,
  Yield,
} from './results'
import { sobolIndices } from './sobol'
import { FIGURES, type KeptSample, type SpreadSummary } from './summary'

export function presentSummary(summary: SpreadSummary): SpreadResult {
  const { settings, evaluated, passed, columns, kept, worst, failures, conductionNotModelled } = summary
  const yieldOf = (count: number): Yield => ({
    passed: count,
    share: evaluated === 0 ? 0 : count / evaluated,
    ...clopperPearson(count, evaluated, settings.confidence),
  })
  return {
    model: settings.model,
    targets: settings.targets,
    confidence: settings.confidence,
    quantities: settings.quantities,
    samples: evaluated,
    yields: {
      all: yieldOf(passed.all),
      reached: yieldOf(passed.reached),
      stable: yieldOf(passed.stable),
      phaseMargin: yieldOf(passed.phaseMargin),
      gainMargin: yieldOf(passed.gainMargin),
      modulusMargin: yieldOf(passed.modulusMargin),
    },
    distributions: {
      crossover: distributionOf(columns.crossover),
      phaseMargin: distributionOf(columns.phaseMargin),
      gainMargin: distributionOf(columns.gainMargin),
      modulusMargin: distributionOf(columns.modulusMargin),
    },
    bands: bandsOf(settings.frequencies, kept),
    closedLoopPoles: kept.map(({ poles }) => poles.map(({ re, im }: Complex) => ({ real: re, imaginary: im }))),
    worst,
    failures,
    conductionNotModelled,
    regression: regressionRankings(summary),
    sobol: sobolRankings(summary),
  }
}

function bandsOf(frequencies: readonly number[], kept: readonly KeptSample[]): LoopBands | null {
  if (kept.length === 0) return null
  return {
    frequencies,
    gainDb: bandOf(
      frequencies.length,
      kept.map(({ gainDb }) => gainDb),
    ),
    phaseDeg: bandOf(
      frequencies.length,
      kept.map(({ phaseDeg }) => phaseDeg),
    ),
    samples: kept.length,
  }
}

function bandOf(points: number, curves: readonly Float32Array[]): QuantileBand {
  const sorted = Array.from({ length: points }, (_, i) => Float64Array.from(curves, (curve) => curve[i]!).sort())
  const quantile = (p: number) => sorted.map((values) => quantileOfSorted(values, p))
  return { low: quantile(0.05), middle: quantile(0.5), high: quantile(0.95) }
}

const nameOf = ({ key, label }: VariedQuantity) => ({ key, label })

function regressionRankings({ settings, regression }: SpreadSummary): RegressionRanking[] {
  return FIGURES.flatMap((figure): RegressionRanking[] => {
    const fit = standardisedFit(regression[figure])
    if (!fit) return []
    const coefficients = settings.quantities
      .map((quantity, i) => ({ ...nameOf(quantity), value: fit.coefficients[i]! }))
      .sort((a, b) => Math.abs(b.value) - Math.abs(a.value))
    return [{ figure, determination: fit.determination, coefficients }]
  })
}

function sobolRankings({ settings, sobol }: SpreadSummary): SobolRanking[] {
  return FIGURES.flatMap((figure): SobolRanking[] => {
    const found = sobolIndices(sobol[figure])
    if (!found) return []
    const indices = settings.quantities
      .map((quantity, i) => ({ ...nameOf(quantity), firstOrder: found.firstOrder[i]!, total: found.total[i]! }))
      .sort((a, b) => b.firstOrder - a.firstOrder)
    return [{ figure, baseSamples: sobol[figure].count, indices }]
  })
}

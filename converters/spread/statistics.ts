/**
 * The statistical run: parts, line and load drawn by Latin hypercube, an operating point and margins for each draw. It
 * goes block by block, so that whoever runs it can show progress and stop, and several workers can take a part each.
 */
import { defaultFrequencies } from '../responseCurve'
import type { DesignDocument } from '../document'
import { evaluatorFor, type Evaluation, type Refusal } from './evaluation'
import { appliedTargets } from './judging'
import type { SpreadModel, SpreadOptions } from './options'
import { presentSummary } from './presentation'
import { latinHypercube } from './random'
import type { SpreadResult } from './results'
import { saltelliRows } from './sobol'
import { accumulate, type SpreadSummary } from './summary'
import { variablesOf, type Variable } from './variables'
import { conditioned, quantileOf, sampleAt, samplerOf, type Sample } from './variation'

/** Whole curves and closed-loop poles are kept of so many samples at most, evenly among them. */
const MOST_KEPT: Readonly<Record<SpreadModel, number>> = { averaged: 250, switched: 200 }
const BAND_FREQUENCIES = 96

/** Which share of a run to do: part `index` of `of` equal ones. */
export interface RunPart {
  readonly index: number
  readonly of: number
}

export interface SpreadRun {
  /** Does about `count` evaluations more. @returns whether some are left. */
  readonly next: (count: number) => boolean
  /** Evaluations, those of the Sobol' indices included. */
  readonly progress: { readonly done: number; readonly total: number }
  /** For `mergeSummaries`, and for crossing between threads. */
  readonly summary: () => SpreadSummary
  readonly snapshot: () => SpreadResult
}

/** @throws DesignError where nominal line and full load cannot be computed, or the design has no network. */
export function startSpread(document: DesignDocument, options: SpreadOptions, part: RunPart): SpreadRun {
  const design = conditioned(document, options.conditions)
  const variables = variablesOf(design, options.vary)
  const evaluate = evaluatorFor(design, options.model)
  const sampling = samplingOf(design, variables, options)
  const d = variables.length

  const own = rangeOf(options.samples, part)
  const base = rangeOf(options.sobolSamples, part)
  const stride = Math.ceil(options.samples / MOST_KEPT[options.model])
  const accumulator = accumulate(
    {
      model: options.model,
      targets: appliedTargets(document, options.targets),
      confidence: options.confidence,
      quantities: variables.map(({ set: _set, ...quantity }) => quantity),
      frequencies: defaultFrequencies(design.switchingFrequency, BAND_FREQUENCIES),
      nominal: nominalMargins(
        evaluate(
          sampleAt(
            design,
            variables,
            variables.map(({ nominal }) => nominal),
          ),
        ),
      ),
    },
    own.from,
    own.to - own.from,
  )
  const cube = latinHypercube(options.samples, d, options.seed)
  const rows = saltelliRows(options.sobolSamples, d, options.seed + 1)
  const coordinates = new Float64Array(d)
  const total = own.to - own.from + (base.to - base.from) * (d + 2)
  let sampleIndex = own.from
  let baseIndex = base.from
  let done = 0

  function evaluateSample(): void {
    cube.point(sampleIndex, coordinates)
    const values = sampling.valuesAt(coordinates)
    const sample = sampling.sampleOf(values)
    accumulator.add(sampleIndex, sample, values, evaluate(sample), sampleIndex % stride === 0)
    sampleIndex++
    done++
  }

  function evaluateBase(): void {
    accumulator.addSobol(rows(baseIndex).map((row) => evaluate(sampling.sampleOf(sampling.valuesAt(row)))))
    baseIndex++
    done += d + 2
  }

  return {
    next(count) {
      const until = Math.min(done + count, total)
      while (done < until && sampleIndex < own.to) evaluateSample()
      while (done < until && baseIndex < base.to) evaluateBase()
      return done < total
    },
    get progress() {
      return { done, total }
    },
    summary: accumulator.summary,
    snapshot: () => presentSummary(accumulator.summary()),
  }
}

/** Whole samples from `from` up to, not including, `to`. */
const rangeOf = (count: number, { index, of }: RunPart) => ({
  from: Math.floor((count * index) / of),
  to: Math.floor((count * (index + 1)) / of),
})

interface Sampling {
  /** Values of the variables at coordinates in (0, 1); they hold until the next ones are asked for. */
  readonly valuesAt: (coordinates: Float64Array) => Float64Array
  readonly sampleOf: (values: Float64Array) => Sample
}

function samplingOf(design: DesignDocument, variables: readonly Variable[], options: SpreadOptions): Sampling {
  const quantiles = variables.map((variable) => quantileOf(variable, options))
  const values = new Float64Array(variables.length)
  return {
    valuesAt(coordinates) {
      for (let i = 0; i < values.length; i++) values[i] = quantiles[i]!(coordinates[i]!)
      return values
    },
    sampleOf: samplerOf(design, variables),
  }
}

/** Nominal line and full load; that they can be reached is what an evaluator asks of its base. */
function nominalMargins(found: Evaluation | Refusal): Evaluation['margins'] {
  if ('refused' in found) throw found.refused
  return found.margins
}

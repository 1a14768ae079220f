import { z } from 'zod'

import { DesignDocument } from '@/converters/document'
import { SpreadOptions } from '@/converters/spread/options'
import { Problem } from '@/server/contract/problems'
import { AppliedTargets, PlacedMargins, SpreadFailures, SpreadModel, VariedQuantity } from '@/server/contract/spread'

export const SpreadRunRequest = z.object({ design: DesignDocument, options: SpreadOptions.prefault({}) })
export type SpreadRunRequest = z.infer<typeof SpreadRunRequest>
export type SpreadRunRequestInput = z.input<typeof SpreadRunRequest>

export const SpreadRunId = z.uuid().describe('Random; knowing it is what lets a client read or cancel the run.')

const figures = z.array(z.number()).readonly()

const Yield = z.object({
  passed: z.number().int(),
  share: z.number(),
  lower: z.number().describe('Clopper–Pearson at the confidence asked for.'),
  upper: z.number(),
})
const Yields = z.object({
  all: Yield,
  reached: Yield,
  stable: Yield,
  phaseMargin: Yield,
  gainMargin: Yield,
  modulusMargin: Yield,
})

const Distribution = z.object({
  count: z.number().int(),
  absent: z.number().int().describe('Reached samples without this figure.'),
  mean: z.number(),
  standardDeviation: z.number(),
  minimum: z.number(),
  maximum: z.number(),
  quantiles: z.object({ p01: z.number(), p05: z.number(), p50: z.number(), p95: z.number(), p99: z.number() }),
  histogram: z.object({ edges: figures.describe('One more than counts.'), counts: figures }),
})
const Distributions = z.object({
  crossover: Distribution.nullable().describe('Hz'),
  phaseMargin: Distribution.nullable().describe('degrees'),
  gainMargin: Distribution.nullable().describe('dB'),
  modulusMargin: Distribution.nullable(),
})

const QuantileBand = z.object({
  low: figures.describe('5 %'),
  middle: figures.describe('50 %'),
  high: figures.describe('95 %'),
})

const Figure = z.enum(['crossover', 'phaseMargin', 'gainMargin', 'modulusMargin'])
const named = { key: z.string(), label: z.string() }

/** The whole of a statistical run. */
export const SpreadResult = z.object({
  model: SpreadModel,
  targets: AppliedTargets,
  confidence: z.number(),
  quantities: z.array(VariedQuantity).readonly(),
  samples: z.number().int(),
  yields: Yields,
  distributions: Distributions.describe('Null for a figure that no sample has.'),
  bands: z
    .object({
      frequencies: figures.describe('Hz'),
      gainDb: QuantileBand,
      phaseDeg: QuantileBand,
      samples: z.number().int(),
    })
    .nullable()
    .describe('Quantiles of the loop gain over the kept samples.'),
  closedLoopPoles: z
    .array(z.array(z.object({ real: z.number(), imaginary: z.number() })).readonly())
    .readonly()
    .describe('rad/s, averaged model; one list a kept sample'),
  worst: PlacedMargins.nullable(),
  failures: SpreadFailures,
  conductionNotModelled: z
    .number()
    .int()
    .describe('Samples whose conduction stops although that is not modelled for the topology.'),
  regression: z
    .array(
      z.object({
        figure: Figure,
        determination: z.number().describe('R²'),
        coefficients: z
          .array(z.object({ ...named, value: z.number() }))
          .readonly()
          .describe('Standardised, largest magnitude first.'),
      }),
    )
    .readonly(),
  sobol: z
    .array(
      z.object({
        figure: Figure,
        baseSamples: z.number().int(),
        indices: z.array(z.object({ ...named, firstOrder: z.number(), total: z.number() })).readonly(),
      }),
    )
    .readonly(),
})
export type SpreadResult = z.infer<typeof SpreadResult>

/** What can be said before the end. */
export const SpreadInterim = SpreadResult.pick({ samples: true, yields: true, distributions: true })
export type SpreadInterim = z.infer<typeof SpreadInterim>

const moment = z.iso.datetime()

/** A statistical run, as far as it has come. It is kept for a day. */
export const SpreadRun = z.object({
  id: SpreadRunId,
  state: z.enum(['queued', 'running', 'done', 'failed', 'cancelled']),
  progress: z.number().min(0).max(1),
  evaluations: z
    .object({ done: z.number().int(), total: z.number().int() })
    .describe("Samples, and the evaluations of the Sobol' indices."),
  createdAt: moment,
  startedAt: moment.nullable(),
  finishedAt: moment.nullable(),
  expiresAt: moment,
  interim: SpreadInterim.nullable().describe('Of the samples so far, while the run goes on or when it was cancelled.'),
  result: SpreadResult.nullable().describe('Once the run is done.'),
  problem: Problem.nullable().describe('Once the run has failed.'),
})
export type SpreadRun = z.infer<typeof SpreadRun>

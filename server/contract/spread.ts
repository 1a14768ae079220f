/** What corners over tolerances and statistical runs share. */
import { z } from 'zod'

import { SPREAD_GROUPS, SPREAD_MODELS } from '@/converters/spread/options'
import { MarginSummary } from '@/server/contract/margins'

export const SpreadModel = z.enum(SPREAD_MODELS)

/** One thing that varies. */
export const VariedQuantity = z.object({
  key: z.string().describe('Path in the design document; `line`, `load` and `sense.lowerResistance` are not in it.'),
  label: z.string(),
  unit: z.enum(['H', 'F', 'Ω', 'V', 'A', 'Hz', 'S', 'V/s', '']),
  group: z.enum(SPREAD_GROUPS),
  nominal: z.number(),
  low: z.number().describe('The end of the tolerance or range.'),
  high: z.number(),
})

export const valuesOfQuantities = z.array(z.number()).readonly().describe('In the order of the quantities.')

export const SpreadFailures = z
  .array(
    z.object({
      code: z.enum([
        'invalid-document',
        'not-yet-supported',
        'unreachable-output',
        'no-operating-point',
        'singular-network',
        'invalid-compensator',
      ]),
      message: z.string(),
      count: z.number().int(),
      values: valuesOfQuantities,
    }),
  )
  .readonly()
  .describe('Why some have no margins, with the first of each kind.')

export const AppliedTargets = z.object({
  phaseMargin: z.number().describe('degrees'),
  gainMargin: z.number().describe('dB'),
  modulusMargin: z.number(),
})

export const PlacedMargins = z.object({
  lineVoltage: z.number().describe('V'),
  outputCurrent: z.number().describe('A'),
  margins: MarginSummary,
  values: valuesOfQuantities,
  slack: z
    .number()
    .describe('Least margin above its target as a share of it: 0 just holds, −1 has no margin left, −2 is unstable.'),
})

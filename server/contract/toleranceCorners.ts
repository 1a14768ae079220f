import { z } from 'zod'

import { DesignDocument } from '@/converters/document'
import { ToleranceCornerOptions } from '@/converters/spread/options'
import { Conduction } from '@/server/contract/analyses'
import { AppliedTargets, PlacedMargins, SpreadFailures, SpreadModel, VariedQuantity } from '@/server/contract/spread'

export const ToleranceCornersRequest = z.object({
  design: DesignDocument,
  options: ToleranceCornerOptions.prefault({}),
})
export type ToleranceCornersRequest = z.infer<typeof ToleranceCornersRequest>
export type ToleranceCornersRequestInput = z.input<typeof ToleranceCornersRequest>

const ToleranceCorner = PlacedMargins.extend({ dutyCycle: z.number(), conduction: Conduction })

const CornerQuantity = VariedQuantity.extend({
  influence: z
    .number()
    .describe('How far the margins move from one end to the other, each as a share of its target, summed.'),
  isCombined: z.boolean().describe('False where the corners leave it at nominal, for the sake of their number.'),
})

/** The loop at every combination of line, load and tolerance ends. */
export const ToleranceCornerSet = z.object({
  model: SpreadModel,
  targets: AppliedTargets,
  quantities: z.array(CornerQuantity).readonly().describe('Line and load, then the others, most influential first.'),
  corners: z.array(ToleranceCorner).readonly().describe('Nominal first.'),
  failures: SpreadFailures,
  worst: ToleranceCorner.nullable().describe('The corner with the least slack; null when none can be reached.'),
  note: z.string().nullable().describe('What was left at nominal; null when every quantity is combined.'),
})
export type ToleranceCornerSet = z.infer<typeof ToleranceCornerSet>

import { z } from 'zod'

import { DesignDocument, OperatingPointRequest } from '@/converters/document'

export const RootLocusRequest = z.object({ design: DesignDocument, operatingPoint: OperatingPointRequest.optional() })
export type RootLocusRequest = z.infer<typeof RootLocusRequest>
export type RootLocusRequestInput = z.input<typeof RootLocusRequest>

const Place = z.object({ real: z.number().describe('rad/s'), imaginary: z.number().describe('rad/s') })

/** Closed-loop poles of the averaged model over the loop's gain. */
export const RootLocus = z.object({
  gainsDb: z.array(z.number()).readonly().describe('dB beside the present gain'),
  branches: z.array(z.array(Place).readonly()).readonly().describe('One a pole, a point a gain.'),
  present: z.number().int().describe('Index of the present gain.'),
  stableRange: z
    .object({ lowestDb: z.number().nullable(), highestDb: z.number().nullable() })
    .nullable()
    .describe('Between these gains the loop is stable; null in one of them: to the end of what is drawn.'),
})
export type RootLocus = z.infer<typeof RootLocus>

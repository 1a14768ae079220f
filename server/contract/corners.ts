import { z } from 'zod'

import { DesignDocument } from '@/converters/document'
import { Conduction } from '@/server/contract/analyses'
import { ResponseCurve, Roots } from '@/server/contract/curves'
import { checkFrequenciesAgainstSwitching, Frequencies } from '@/server/contract/frequencies'
import { Margins } from '@/server/contract/margins'

export const CornersRequest = z
  .object({ design: DesignDocument, frequencies: Frequencies.optional() })
  .check(checkFrequenciesAgainstSwitching)
export type CornersRequest = z.infer<typeof CornersRequest>
export type CornersRequestInput = z.input<typeof CornersRequest>

const Corner = z.object({
  lineVoltage: z.number().describe('V'),
  outputCurrent: z.number().describe('A'),
  conduction: Conduction,
  dutyCycle: z.number(),
  margins: Margins,
  loop: ResponseCurve,
  poles: Roots,
  rightHalfPlaneZero: z.number().nullable().describe('Hz'),
})

/** The loop at every corner of line and load. */
export const CornerSet = z.object({
  frequencies: z.array(z.number()).readonly().describe('Hz'),
  corners: z.array(Corner).readonly(),
  worst: z.number().int().describe('Index of the corner with the smallest phase margin.'),
})
export type CornerSet = z.infer<typeof CornerSet>

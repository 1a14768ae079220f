import { z } from 'zod'

import { DesignDocument, TOPOLOGIES } from '@/converters/document'

export const SampleSlug = z.string().regex(/^[a-z0-9]+(-[a-z0-9]+)*$/)

/** A worked sample as a card shows it. */
export const SampleSummary = z.object({
  slug: SampleSlug,
  title: z.string(),
  summary: z.string(),
  topology: z.enum(TOPOLOGIES),
  control: z.enum(['voltage-mode', 'peak-current-mode']),
  switchingFrequency: z.number().describe('Hz'),
  line: z.object({ minimum: z.number(), nominal: z.number(), maximum: z.number() }).describe('V'),
  output: z.object({ voltage: z.number(), currentMinimum: z.number(), currentMaximum: z.number() }).describe('V and A'),
})
export type SampleSummary = z.infer<typeof SampleSummary>

export const SampleList = z.object({ samples: z.array(SampleSummary) })
export type SampleList = z.infer<typeof SampleList>

export const Sample = SampleSummary.extend({ design: DesignDocument })
export type Sample = z.infer<typeof Sample>

import type { DesignDocumentInput } from '@/converters/document'
import { SAMPLES } from '@/db/seed/samples'

/** The logic rail among the worked samples, with a type III network closing its loop. */
export const benchDesign: DesignDocumentInput = {
  ...sampleDesign('logger-logic-rail'),
  compensator: { type: 'III', parts: { R1: 10e3, R2: 12.1e3, R3: 270, C1: 1.5e-9, C2: 33e-12, C3: 1e-9 } },
}

const POINTS = 400
const LOWEST = 10 // Hz

/** 400 frequencies from 10 Hz to half the switching frequency. */
export const benchFrequencies = Array.from(
  { length: POINTS },
  (_, index) => LOWEST * (benchDesign.switchingFrequency / 2 / LOWEST) ** (index / (POINTS - 1)),
)

function sampleDesign(slug: string): DesignDocumentInput {
  const sample = SAMPLES.find((candidate) => candidate.slug === slug)
  if (!sample) throw new Error(`There is no sample called ${slug}.`)
  return sample.design
}

import { z } from 'zod'

const Crossing = z.object({
  frequency: z.number().describe('Hz'),
  gainDb: z.number(),
  phaseDeg: z.number(),
  margin: z.number().describe('Phase margin in degrees at a gain crossing, gain margin in dB at a phase crossing.'),
})

/** Read up to half the switching frequency. A margin that does not exist is null. */
export const Margins = z.object({
  crossover: z.number().nullable().describe('Hz, the highest gain crossing'),
  phaseMargin: z.number().nullable().describe('degrees, the smallest over all gain crossings'),
  gainMargin: z.number().nullable().describe('dB'),
  gainReductionMargin: z.number().nullable().describe('dB that the gain may fall before the loop is unstable'),
  modulusMargin: z.number().describe('Least distance of the loop gain from −1.'),
  modulusMarginFrequency: z.number().describe('Hz'),
  sensitivityPeak: z.number(),
  delayMargin: z.number().nullable().describe('s'),
  gainCrossings: z.array(Crossing).readonly(),
  phaseCrossings: z.array(Crossing).readonly(),
  isStable: z.boolean(),
})

export const MarginSummary = z.object({
  crossover: z.number().nullable().describe('Hz'),
  phaseMargin: z.number().nullable().describe('degrees'),
  gainMargin: z.number().nullable().describe('dB'),
  modulusMargin: z.number(),
  isStable: z.boolean(),
})

export const CornerMargins = z.object({
  nominal: MarginSummary,
  worst: MarginSummary.extend({
    lineVoltage: z.number().describe('V'),
    outputCurrent: z.number().describe('A'),
  }),
})

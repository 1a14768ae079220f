import { z } from 'zod'

export const ResponsePoint = z.object({
  gainDb: z.number(),
  phaseDeg: z.number().describe('Unwrapped along the frequency list.'),
})

/** One point for each frequency of the answer. */
export const ResponseCurve = z.array(ResponsePoint).readonly()

/** The same curve from both models; `averaged` is empty where the averaged model does not hold. */
export const CurvePair = z.object({ averaged: ResponseCurve, switched: ResponseCurve })

/** A pole or a zero; a conjugate pair is two roots, the one with positive imaginary part first. */
export const Root = z.object({
  real: z.number().describe('rad/s'),
  imaginary: z.number().describe('rad/s'),
  frequency: z.number().describe('Hz'),
  dampingRatio: z.number().describe('Negative in the right half plane.'),
  quality: z.number().nullable().describe('Null for a real root or one on the imaginary axis.'),
  timeConstant: z.number().nullable().describe('s; null on the imaginary axis'),
  ringingFrequency: z.number().describe('Hz; 0 for a real root'),
  halfPlane: z.enum(['left', 'right', 'axis']),
  role: z.enum([
    'output-filter',
    'capacitor-esr',
    'input-filter',
    'coupling',
    'right-half-plane-zero',
    'sampling',
    'inductor',
    'load-capacitor',
    'integrator',
    'compensator',
    'amplifier',
    'loop',
    'other',
  ]),
})
export const Roots = z.array(Root).readonly()

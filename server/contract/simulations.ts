import { z } from 'zod'

import { DesignDocument } from '@/converters/document'
import { SimulationOptions } from '@/converters/simulation/scenario'
import { ClosedLoopMap, StepResponse } from '@/server/contract/analyses'
import { ResponseCurve } from '@/server/contract/curves'

export const SimulationRequest = z.object({ design: DesignDocument, options: SimulationOptions.prefault({}) })
export type SimulationRequest = z.infer<typeof SimulationRequest>
export type SimulationRequestInput = z.input<typeof SimulationRequest>

const perPeriod = (unit: string) => z.array(z.number()).readonly().describe(unit)

/** The closed loop cycle by cycle; one value a period in every list. */
export const Simulation = z.object({
  map: ClosedLoopMap,
  loopWithRipple: z
    .object({ frequencies: perPeriod('Hz'), response: ResponseCurve })
    .nullable()
    .describe('As an analyser reads it on the running converter; null where the orbit is not the one that runs.'),
  disturbedAt: z.number().describe('s'),
  time: perPeriod('s, middle of the period'),
  meanOutput: perPeriod('V'),
  lowestOutput: perPeriod('V'),
  highestOutput: perPeriod('V'),
  peakCurrent: perPeriod('A, inductor'),
  control: perPeriod("V, at the period's end"),
  duty: perPeriod('share of the period'),
  readings: z.object({
    peakDeviation: z.number().describe('V, signed'),
    peakTime: z.number().describe('s after the disturbance'),
    recoveryTime: z.number().nullable().describe('s until within a tenth of the peak for good'),
    ringingFrequency: z.number().nullable().describe('Hz'),
    decayTimeConstant: z.number().nullable().describe('s'),
    restDeviation: z.number().describe('V, largest distance from rest in the last periods'),
    alternates: z.boolean().describe('The duty goes up and down from one period to the next at the end.'),
  }),
  prediction: StepResponse.nullable().describe("The averaged model's answer to the same step."),
})
export type Simulation = z.infer<typeof Simulation>

import { z } from 'zod'

import { DesignDocument, OperatingPointRequest } from '@/converters/document'
import { CurvePair, ResponseCurve, Roots } from '@/server/contract/curves'
import { checkFrequenciesAgainstSwitching, Frequencies } from '@/server/contract/frequencies'
import { Margins } from '@/server/contract/margins'

export const AnalysisRequest = z
  .object({
    design: DesignDocument,
    operatingPoint: OperatingPointRequest.optional(),
    frequencies: Frequencies.optional(),
  })
  .check(checkFrequenciesAgainstSwitching)
export type AnalysisRequest = z.infer<typeof AnalysisRequest>
export type AnalysisRequestInput = z.input<typeof AnalysisRequest>

export const Conduction = z.enum(['continuous', 'discontinuous'])

const CurrentFigures = z.object({
  average: z.number().describe('A'),
  rms: z.number().describe('A'),
  peak: z.number().describe('A'),
})

const OperatingPoint = z.object({
  lineVoltage: z.number().describe('V'),
  outputCurrent: z.number().describe('A'),
  dutyCycle: z.number(),
  conduction: Conduction,
  rectifierDuty: z.number().describe('Share of the period in which the rectifier conducts.'),
  outputRipple: z.number().describe('V peak to peak'),
  inductorCurrent: CurrentFigures.extend({
    valley: z.number().describe('A'),
    ripple: z.number().describe('A peak to peak'),
  }),
  switchCurrent: CurrentFigures,
  rectifierCurrent: CurrentFigures,
  outputCapacitorRmsCurrent: z.array(z.number()).readonly().describe('A, one for each bank'),
  switchVoltage: z
    .number()
    .nullable()
    .describe('V, the highest while open; null where it hangs on a part not described'),
  rectifierVoltage: z.number().describe('V, the highest reverse voltage'),
  boundaryCurrent: z.number().nullable().describe('A of load at which conduction becomes discontinuous'),
  controlVoltage: z.number().describe('V at the comparator when the switch turns off'),
  inputPower: z.number().describe('W'),
  efficiency: z.number().describe('0 to 1, conduction losses only'),
})

const ClosedForm = z.object({
  key: z.enum([
    'resonance',
    'quality',
    'esr-zero',
    'right-half-plane-zero',
    'control-gain',
    'line-gain',
    'load-pole',
    'sampling-quality',
    'critical-slope',
    'high-frequency-pole',
  ]),
  label: z.string(),
  value: z.number(),
  unit: z.enum(['Hz', '', 'V', 'V/V', 'V/s']),
  equation: z.string(),
  source: z.string(),
})

const Multipliers = z.array(z.object({ real: z.number(), imaginary: z.number(), modulus: z.number() })).readonly()

const PeriodMap = z.object({
  multipliers: Multipliers,
  isStable: z.boolean(),
  slopeNeeded: z.number().nullable().describe('V/s of slope compensation from which the orbit is stable'),
})

/** Stability of the switched loop itself, ripple at the comparator included. */
export const ClosedLoopMap = z.object({
  multipliers: Multipliers,
  isStable: z.boolean(),
  controlRipple: z.number().describe('V peak to peak that the network lets through to the comparator'),
  rampSpan: z.number().describe("V that the comparator's other input rises by during the pulse"),
  firesEarly: z.boolean().describe('The ripple makes the comparator fire before the pulse should end.'),
})

const Loop = z.object({
  response: CurvePair,
  compensator: ResponseCurve,
  compensatorPoles: Roots,
  compensatorZeros: Roots,
  closedLoopPoles: Roots,
  periodMap: ClosedLoopMap,
  closedLoop: z.object({ lineToOutput: CurvePair, outputImpedance: CurvePair }),
})

const Mode = z.object({
  timeConstant: z.number().describe('s'),
  ringingFrequency: z.number().describe('Hz'),
  amplitude: z.number().describe('V'),
})

export const StepResponse = z.object({
  size: z.number().describe('A for the load step, V for the line step'),
  time: z.array(z.number()).readonly().describe('s'),
  outputDeviation: z.array(z.number()).readonly().describe('V'),
  peakDeviation: z.number().describe('V, signed'),
  peakTime: z.number().describe('s'),
  recoveryTime: z.number().nullable().describe('s until within a tenth of the peak for good'),
  modes: z.array(Mode).readonly(),
})

const Warning = z.object({
  code: z.enum([
    'subharmonic-oscillation',
    'unstable-orbit',
    'unstable-loop',
    'unstable-switching',
    'models-part',
    'duty-near-limit',
    'conduction-not-modelled',
    'crossover-above-right-half-plane-zero',
    'crossover-near-switching',
    'conditionally-stable',
    'several-crossovers',
    'ripple-large',
    'input-filter',
    'optocoupler-bias',
    'hazardous-voltage',
  ]),
  message: z.string(),
  field: z.string().nullable(),
})

/** An input filter against the converter that it feeds. */
const InputFilterCheck = z.object({
  frequencies: z.array(z.number()).readonly().describe('Hz'),
  filterImpedance: ResponseCurve.describe('Ω, seen from the converter'),
  nullImpedance: ResponseCurve.describe('Ω, converter input with the output held still by the control'),
  openLoopImpedance: ResponseCurve.describe('Ω, control held still'),
  closedLoopImpedance: ResponseCurve.nullable().describe('Ω'),
  margin: z.number().describe("dB, least ratio of the converter's impedances to the filter's"),
  marginFrequency: z.number().describe('Hz'),
  suggestion: z
    .object({
      dampingCapacitance: z.number().describe('F'),
      dampingResistance: z.number().describe('Ω'),
      peakImpedance: z.number().describe('Ω'),
      source: z.string(),
    })
    .nullable()
    .describe('A damping branch that keeps them apart; null if they are.'),
})

/** One design at one operating point: its plant, its loop and its margins. */
export const Analysis = z.object({
  engineVersion: z.string(),
  operatingPoint: OperatingPoint,
  periodMap: PeriodMap,
  plant: z.object({ poles: Roots, zeros: Roots, closedForms: z.array(ClosedForm).readonly() }),
  frequencies: z.array(z.number()).readonly().describe('Hz'),
  responses: z.object({ controlToOutput: CurvePair, lineToOutput: CurvePair, outputImpedance: CurvePair }),
  inputFilter: InputFilterCheck.nullable(),
  innerCurrentLoop: ResponseCurve.nullable().describe('Current mode only.'),
  loop: Loop.nullable().describe('Null while the design has no compensator.'),
  margins: Margins.nullable().describe('From the switched model.'),
  averagedMargins: Margins.nullable(),
  steps: z
    .object({ load: StepResponse, line: StepResponse })
    .nullable()
    .describe('Null without a compensator or when the loop is unstable.'),
  warnings: z.array(Warning).readonly(),
})
export type Analysis = z.infer<typeof Analysis>

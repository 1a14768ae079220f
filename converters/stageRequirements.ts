/** What the quick start asks for: the few figures that a designer has on the first day. */
import { z } from 'zod'
import { DesignDocument } from './document'

const share = (usual: number, least: number, most: number) =>
  z
    .number({ error: 'Give a fraction.' })
    .min(least, { error: `Must be at least ${least}.` })
    .max(most, { error: `Must be at most ${most}.` })
    .default(usual)

/** The sections are those of the design document, with the same paths and messages. */
export const StageRequirements = z.object({
  topology: DesignDocument.shape.topology,
  controlScheme: z.enum(['voltage-mode', 'peak-current-mode']),
  rectifier: z.enum(['synchronous', 'diode']).default('synchronous'),
  line: DesignDocument.shape.line,
  output: DesignDocument.shape.output,
  switchingFrequency: DesignDocument.shape.switchingFrequency,
  /** Inductor ripple, peak to peak, as a share of its mean current at full load. */
  rippleRatio: share(0.35, 0.05, 2),
  /** Output ripple, peak to peak, as a share of the output voltage. */
  outputRipple: share(0.01, 0.0005, 0.2),
  /** A load step of this share of full load … */
  loadStep: share(0.5, 0.05, 1),
  /** … may move the output by this share of its voltage. */
  outputDeviation: share(0.03, 0.002, 0.3),
})
/** Checked requirements, every default filled in. */
export type StageRequirements = z.infer<typeof StageRequirements>
/** What may be given. */
export type StageRequirementsInput = z.input<typeof StageRequirements>

/** Whether margins meet their targets, and by how much. */
import type { DesignDocument } from '../document'
import type { MarginSummary } from '../results'
import { USUAL_MODULUS_MARGIN, type SpreadTargets } from './options'
import type { AppliedTargets } from './results'

export function appliedTargets({ targets }: DesignDocument, asked: SpreadTargets): AppliedTargets {
  return {
    phaseMargin: asked.phaseMargin ?? targets.phaseMargin,
    gainMargin: asked.gainMargin ?? targets.gainMargin,
    modulusMargin: asked.modulusMargin ?? USUAL_MODULUS_MARGIN,
  }
}

/** Slack of an unstable loop: below anything that a stable one can have. */
export const UNSTABLE = -2
/** With no margin that could be short, a finite figure keeps comparisons simple. */
const AMPLE = 10

/** The least margin above its target, as a share of the target; a margin that does not exist cannot be short. */
export function slackOf(margins: MarginSummary, targets: AppliedTargets): number {
  if (!margins.isStable) return UNSTABLE
  const share = (margin: number | null, target: number, least: number) =>
    margin === null ? AMPLE : (margin - target) / Math.max(target, least)
  return Math.min(
    share(margins.phaseMargin, targets.phaseMargin, 1),
    share(margins.gainMargin, targets.gainMargin, 1),
    share(margins.modulusMargin, targets.modulusMargin, 0.01),
    AMPLE,
  )
}

/** Only a stable loop has margins that count. */
export function verdictsOf(margins: MarginSummary, targets: AppliedTargets) {
  const { isStable, modulusMargin } = margins
  const phaseMargin = isStable && (margins.phaseMargin ?? Infinity) >= targets.phaseMargin
  const gainMargin = isStable && (margins.gainMargin ?? Infinity) >= targets.gainMargin
  const modulus = isStable && modulusMargin >= targets.modulusMargin
  return {
    reached: true,
    stable: isStable,
    phaseMargin,
    gainMargin,
    modulusMargin: modulus,
    all: phaseMargin && gainMargin && modulus,
  }
}

/** The closed-loop period map in words. */
import { figure, ratio } from '@/components/format'
import type { ClosedLoopMap } from '@/converters/results'

/** What becomes of a disturbance from one period to the next, and why. */
export function mapSentences(
  { multipliers, isStable, firesEarly, controlRipple, rampSpan }: ClosedLoopMap,
  alternates: boolean,
): string[] {
  const leading = multipliers.reduce<ClosedLoopMap['multipliers'][number] | undefined>(
    (greatest, multiplier) => ((greatest?.modulus ?? -1) >= multiplier.modulus ? greatest : multiplier),
    undefined,
  )
  if (!leading) return []
  const isAlternating = leading.real < 0 && Math.abs(leading.imaginary) < 0.05 * leading.modulus
  const size = ratio(leading.modulus)
  const sentences: string[] = []
  if (isStable) {
    sentences.push(`After each period ${size} of a disturbance is left: the switched loop settles.`)
  } else if (isAlternating) {
    sentences.push(
      `Each period turns a disturbance over and makes it ${size} times as large: the loop oscillates at half the switching frequency.`,
    )
  } else {
    sentences.push(`Each period makes a disturbance ${size} times as large: the switched loop oscillates.`)
  }
  if (firesEarly) {
    sentences.push(
      `The network lets ${figure(controlRipple, 'V')} of ripple through to the comparator, which rises by ${figure(rampSpan, 'V')} during the pulse: it fires before the pulse should end.`,
    )
  } else if (!isStable) {
    sentences.push(
      'The margins of the averaged model need not show it. More slope at the comparator, or less gain of the network near the switching frequency, is the usual cure.',
    )
  }
  if (alternates) sentences.push('The transient agrees: at its end the duty goes up and down from period to period.')
  return sentences
}

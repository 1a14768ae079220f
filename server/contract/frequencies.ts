import { z } from 'zod'

export const FREQUENCIES_MAX = 2_000
const FREQUENCY_MAX = 1e9 // Hz
/** Beyond this many times the switching frequency nothing in the models means anything. */
const SWITCHING_MULTIPLE_MAX = 10

/** Hz at which curves are wanted; left out, the engine chooses a grid from 10 Hz up. */
export const Frequencies = z
  .array(
    z
      .number({ error: 'Give a number in Hz.' })
      .positive({ error: 'Must be greater than zero.' })
      .max(FREQUENCY_MAX, { error: `Must be at most ${FREQUENCY_MAX} Hz.` }),
    { error: 'Give a list of frequencies in Hz.' },
  )
  .min(1, { error: 'Give at least one frequency, or leave the list out.' })
  .max(FREQUENCIES_MAX, { error: `Give at most ${FREQUENCIES_MAX} frequencies.` })

interface WithFrequencies {
  readonly design: { readonly switchingFrequency: number }
  readonly frequencies?: readonly number[] | undefined
}

/** Adds an issue for the first frequency that lies too far above the switching frequency. */
export function checkFrequenciesAgainstSwitching({ value, issues }: z.core.ParsePayload<WithFrequencies>): void {
  const limit = SWITCHING_MULTIPLE_MAX * value.design.switchingFrequency
  const index = value.frequencies?.findIndex((frequency) => frequency > limit) ?? -1
  if (index < 0) return
  const message = `Must be at most ${SWITCHING_MULTIPLE_MAX} times the switching frequency, ${limit} Hz.`
  issues.push({ code: 'custom', message, input: value.frequencies?.[index], path: ['frequencies', index] })
}

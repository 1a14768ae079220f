/** Frequencies at which the screens ask for curves. */
const LOWEST = 10 // Hz
/** The rule's keyboard step, so that a reading never falls between two points. */
export const POINTS_PER_DECADE = 48
const FEWEST_DECADES = 3

/** Where the rule and the plots begin, in Hz: 10 Hz, or lower where that leaves too little before the switching frequency. */
export function lowestFrequency(switchingFrequency: number): number {
  return Math.min(LOWEST, switchingFrequency / 10 ** FEWEST_DECADES)
}

/**
 * Logarithmic grid from the lowest frequency to half the switching frequency, both included, in Hz. Above it a sampled
 * loop has nothing new to say.
 */
export function frequencyGrid(switchingFrequency: number): number[] {
  const lowest = lowestFrequency(switchingFrequency)
  const decades = Math.log10(switchingFrequency / 2 / lowest)
  const intervals = Math.round(decades * POINTS_PER_DECADE)
  return Array.from({ length: intervals + 1 }, (_, index) =>
    Number((lowest * 10 ** ((decades * index) / intervals)).toPrecision(6)),
  )
}

/** A quantity over time, one value a period or one for several periods together. */
export interface Trace {
  readonly time: readonly number[] // s
  readonly low: readonly number[]
  readonly middle: readonly number[]
  readonly high: readonly number[]
}

/**
 * As many points as a screen can tell apart: neighbours go together, their middle is the mean, and nothing that lies
 * between lowest and highest is lost.
 */
export function condensed({ time, low, middle, high }: Trace, most: number): Trace {
  const size = Math.ceil(time.length / most)
  if (size <= 1) return { time, low, middle, high }
  const starts = Array.from({ length: Math.ceil(time.length / size) }, (_, index) => index * size)
  const groups = (values: readonly number[]) => starts.map((start) => values.slice(start, start + size))
  const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length
  return {
    time: groups(time).map(mean),
    low: groups(low).map((values) => Math.min(...values)),
    middle: groups(middle).map(mean),
    high: groups(high).map((values) => Math.max(...values)),
  }
}

/** One value a period, without a spread of its own. */
export const traceOf = (time: readonly number[], values: readonly number[]): Trace => ({
  time,
  low: values,
  middle: values,
  high: values,
})

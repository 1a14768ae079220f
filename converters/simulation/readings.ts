/** What is read off a simulated transient. */
import type { TransientReadings } from '../results'

/** Share of the peak within which the output counts as recovered, and within which an extreme counts as none. */
const RECOVERED = 0.1
const NOTHING = 0.03
/** Periods at the end over which the loop has to be at rest. */
const TAIL = 40

/**
 * @param deviation - mean of each period from the wanted output, V.
 * @param duty - of each period.
 * @param disturbed - period in which the disturbance comes.
 * @param period - s.
 */
export function readTransient(
  deviation: readonly number[],
  duty: readonly number[],
  disturbed: number,
  period: number,
): TransientReadings {
  const after = deviation.slice(disturbed)
  const final = mean(after.slice(-TAIL))
  const relative = after.map((value) => value - final)
  const peakAt = indexOfLargest(relative)
  const peak = relative[peakAt]!
  const settled = relative.findLastIndex((value) => Math.abs(value) > RECOVERED * Math.abs(peak))
  const ringing = readRinging(relative, peakAt, Math.abs(peak), period)
  const tail = relative.slice(-TAIL)
  const tailSize = Math.max(...tail.map(Math.abs))
  return {
    peakDeviation: after[peakAt]!,
    peakTime: (peakAt + 0.5) * period,
    recoveryTime: settled + 1 < relative.length - TAIL ? (settled + 1) * period : null,
    ...ringing,
    restDeviation: tailSize,
    alternates: alternation(duty.slice(-TAIL)) > 1e-3,
  }
}

const mean = (values: readonly number[]): number => values.reduce((a, b) => a + b, 0) / values.length

const indexOfLargest = (values: readonly number[]): number =>
  values.reduce((best, value, i) => (Math.abs(value) > Math.abs(values[best]!) ? i : best), 0)

/** Extremes on alternating sides of the rest: their spacing is half a ringing period, their ratio the decay. */
function readRinging(values: readonly number[], from: number, peak: number, period: number) {
  const extremes = [{ at: from, size: peak, sign: Math.sign(values[from]!) }]
  for (let i = from + 1; i < values.length - 1; i++) {
    const value = values[i]!
    const last = extremes.at(-1)!
    const isExtreme = Math.abs(value) >= Math.abs(values[i - 1]!) && Math.abs(value) >= Math.abs(values[i + 1]!)
    if (isExtreme && Math.sign(value) === -last.sign && Math.abs(value) > NOTHING * peak) {
      extremes.push({ at: i, size: Math.abs(value), sign: Math.sign(value) })
    }
  }
  const last = extremes.at(-1)!
  const halves = extremes.length - 1
  if (halves === 0) return { ringingFrequency: null, decayTimeConstant: null }
  const span = (last.at - from) * period
  return {
    ringingFrequency: halves / (2 * span),
    decayTimeConstant: last.size < peak ? span / Math.log(peak / last.size) : null,
  }
}

/** Size of a duty that goes up and down from one period to the next. */
function alternation(duty: readonly number[]): number {
  return Math.abs(mean(duty.map((value, i) => (i % 2 === 0 ? value : -value))))
}

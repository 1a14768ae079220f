/** Curves are sent to a millionth of a decibel or degree, far below what they are good for: half the bytes. */
const CURVE_STEPS = 1e6
const CURVE_KEYS = new Set(['gainDb', 'phaseDeg'])

function presentValue(key: string, value: unknown): unknown {
  if (typeof value !== 'number') return value
  // JSON would turn it into null without a word.
  if (!Number.isFinite(value)) throw new RangeError(`The answer holds ${value} at "${key}".`)
  return CURVE_KEYS.has(key) ? Math.round(value * CURVE_STEPS) / CURVE_STEPS : value
}

/** Writes an answer of the engine as JSON in UTF-8. @throws RangeError if a number in it is not finite. */
export function writeAnswer(answer: object): Uint8Array<ArrayBuffer> {
  return new TextEncoder().encode(JSON.stringify(answer, presentValue))
}

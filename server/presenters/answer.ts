import type { ResponseCurve, ResponsePoint } from '@/converters/results'

/** Curves are sent to a millionth of a decibel or degree, far below what they are good for: three quarters of the bytes. */
const CURVE_STEPS = 1e6

function finite(value: number, key: string): number {
  // JSON would turn it into null without a word.
  if (!Number.isFinite(value)) throw new RangeError(`The answer holds ${value} at "${key}".`)
  return value
}

const rounded = (value: number, key: string) => Math.round(finite(value, key) * CURVE_STEPS) / CURVE_STEPS

function isCurve(list: readonly unknown[]): list is ResponseCurve {
  const [first] = list
  return typeof first === 'object' && first !== null && Object.keys(first).join() === 'gainDb,phaseDeg'
}

const presentPoint = ({ gainDb, phaseDeg }: ResponsePoint): ResponsePoint => ({
  gainDb: rounded(gainDb, 'gainDb'),
  phaseDeg: rounded(phaseDeg, 'phaseDeg'),
})

/** A copy ready for JSON.stringify, whose own replacer is several times slower. */
function present(value: unknown, key: string): unknown {
  if (typeof value === 'number') return finite(value, key)
  if (Array.isArray(value)) return presentList(value, key)
  if (typeof value !== 'object' || value === null) return value
  return Object.fromEntries(Object.entries(value).map(([name, item]) => [name, present(item, name)]))
}

function presentList(list: readonly unknown[], key: string): readonly unknown[] {
  return isCurve(list) ? list.map(presentPoint) : list.map((item) => present(item, key))
}

/** Writes an answer of the engine as JSON in UTF-8. @throws RangeError if a number in it is not finite. */
export function writeAnswer(answer: object): Uint8Array<ArrayBuffer> {
  return new TextEncoder().encode(JSON.stringify(present(answer, '')))
}

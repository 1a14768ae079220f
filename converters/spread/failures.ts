/** Samples and corners without margins, gathered by reason. */
import type { DesignError } from '../errors'
import type { SpreadFailure } from './results'

/** The same failures with one more; the first of each kind is the one that is told. */
export function withFailure(
  failures: readonly SpreadFailure[],
  { code, message }: Pick<DesignError, 'code' | 'message'>,
  values: ArrayLike<number>,
): SpreadFailure[] {
  return mergeFailures([...failures, { code, message, count: 1, values: Array.from(values) }])
}

export function mergeFailures(failures: readonly SpreadFailure[]): SpreadFailure[] {
  const byCode = new Map<string, SpreadFailure>()
  for (const failure of failures) {
    const known = byCode.get(failure.code)
    byCode.set(failure.code, known ? { ...known, count: known.count + failure.count } : failure)
  }
  return [...byCode.values()].sort((a, b) => b.count - a.count)
}

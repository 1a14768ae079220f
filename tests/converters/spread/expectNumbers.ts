import { expect } from 'vitest'
import { allNumbers } from '@/tests/support/allNumbers'

/** Fails at the first number anywhere in a result that is not finite. */
export function expectNumbers(value: unknown): void {
  expect(allNumbers(value).filter(([, number]) => !Number.isFinite(number))).toEqual([])
}

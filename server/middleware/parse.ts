import type { z } from 'zod'

import { check } from '@/server/contract/checking'
import { AppError } from '@/server/errors'

/**
 * Checks a request against a schema of the contract.
 * @throws AppError 'invalid-request' listing every bad field
 */
export function parse<Schema extends z.ZodType>(schema: Schema, value: unknown): z.output<Schema> {
  const checked = check(schema, value)
  if (checked.kind === 'sound') return checked.value
  const { errors } = checked
  const [first] = errors
  throw new AppError('invalid-request', {
    detail: first && (first.field ? `${first.field}: ${first.message}` : first.message),
    errors,
  })
}

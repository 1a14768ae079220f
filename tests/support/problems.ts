import { expect } from 'vitest'

import { Problem } from '@/server/contract/problems'

/** Reads an answer that has to be a problem document of this status. */
export async function readProblem(response: Response, status: number): Promise<Problem> {
  expect(response.status).toBe(status)
  expect(response.headers.get('content-type')).toMatch(/^application\/problem\+json/)
  const problem = Problem.parse(await response.json())
  expect(problem.status).toBe(status)
  return problem
}

/** The fields that a problem document names, sorted. */
export function fieldsOf({ errors = [] }: Problem): string[] {
  return errors.map(({ field }) => field).sort()
}

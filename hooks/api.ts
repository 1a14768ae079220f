import type { z } from 'zod'
import { API_ROOT } from '@/server/contract/endpoints'
import { Problem, type FieldProblem } from '@/server/contract/problems'

/** What can go wrong between screen and server. */
export type ApiFailure =
  | { readonly kind: 'unreachable' }
  | { readonly kind: 'unreadable' } // an answer that is not what the contract says
  | { readonly kind: 'problem'; readonly problem: Problem; readonly retryAfter: number | null } // s

export class ApiError extends Error {
  override readonly name = 'ApiError'
  constructor(readonly failure: ApiFailure) {
    super(sentenceOf(failure))
  }
}

function sentenceOf(failure: ApiFailure): string {
  switch (failure.kind) {
    case 'unreachable':
      return 'The server cannot be reached. Your entries are kept in this browser.'
    case 'unreadable':
      return 'The server gave an answer that cannot be read. Reload the page; your entries are kept.'
    case 'problem':
      return failure.problem.detail ?? failure.problem.title
  }
}

/** The fields that an error is about, by their path in the design document. */
export function fieldProblems(error: unknown): readonly FieldProblem[] {
  if (!(error instanceof ApiError) || error.failure.kind !== 'problem') return []
  const problems = error.failure.problem.errors ?? []
  return problems.map(({ field, message }) => ({ field: pathOf(field), message }))
}

/** `design.outputCapacitors[0].esr` is `outputCapacitors.0.esr` on the screens. */
export function pathOf(field: string): string {
  return field.replace(/^(design|requirements)\./, '').replace(/\[(\d+)\]/g, '.$1')
}

/** The same by path, the first sentence of each. */
export function problemsByPath(error: unknown): Readonly<Record<string, string>> {
  const byPath: Record<string, string> = {}
  for (const { field, message } of fieldProblems(error)) byPath[field] ??= message
  return byPath
}

interface Call {
  readonly body?: unknown
  readonly signal?: AbortSignal
}

async function call<T extends z.ZodType>(method: string, path: string, schema: T, { body, signal }: Call) {
  const headers = { accept: 'application/json', ...(body !== undefined && { 'content-type': 'application/json' }) }
  const init = { method, headers, signal, ...(body !== undefined && { body: JSON.stringify(body) }) }
  const response = await fetch(`${API_ROOT}${path}`, init).catch((error: unknown) => {
    if (signal?.aborted) throw error
    throw new ApiError({ kind: 'unreachable' })
  })
  const json: unknown = await response.json().catch((error: unknown) => {
    if (signal?.aborted) throw error
    return undefined
  })
  if (!response.ok) throw refusal(response, json)
  const answer = schema.safeParse(json)
  if (!answer.success) throw new ApiError({ kind: 'unreadable' })
  return answer.data
}

function refusal(response: Response, json: unknown): ApiError {
  const problem = Problem.safeParse(json)
  // A proxy in front of the server answers in its own words when the server is away.
  if (!problem.success) return new ApiError({ kind: response.status >= 502 ? 'unreachable' : 'unreadable' })
  const retryAfter = Number(response.headers.get('retry-after') ?? Number.NaN)
  return new ApiError({
    kind: 'problem',
    problem: problem.data,
    retryAfter: Number.isFinite(retryAfter) ? retryAfter : null,
  })
}

/** The API, each answer checked against the contract. @throws ApiError */
export const api = {
  get: <T extends z.ZodType>(path: string, schema: T, signal?: AbortSignal) => call('GET', path, schema, { signal }),
  post: <T extends z.ZodType>(path: string, body: unknown, schema: T, signal?: AbortSignal) =>
    call('POST', path, schema, { body, signal }),
  delete: <T extends z.ZodType>(path: string, schema: T) => call('DELETE', path, schema, {}),
}

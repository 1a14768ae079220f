import { type FieldProblem, type ProblemCode, PROBLEMS } from '@/server/contract/problems'

interface AppErrorOptions {
  /** What is wrong with this request, in a sentence that can be shown. */
  readonly detail?: string
  readonly errors?: readonly FieldProblem[]
  /** Response headers that belong to the problem, Retry-After for example. */
  readonly headers?: Readonly<Record<string, string>>
}

/** A failure that the client is told about. Everything else becomes a plain 500. */
export class AppError extends Error {
  override readonly name = 'AppError'
  readonly detail: string | undefined
  readonly errors: readonly FieldProblem[] | undefined
  readonly headers: Readonly<Record<string, string>>

  constructor(
    readonly code: ProblemCode,
    { detail, errors, headers = {} }: AppErrorOptions = {},
  ) {
    super(detail ?? PROBLEMS[code].title)
    this.detail = detail
    this.errors = errors
    this.headers = headers
  }
}

/** What the API answers when it cannot do what was asked: problem documents as in RFC 9457. */
import { z } from 'zod'

/** Every kind of problem, with its HTTP status and the sentence that names it. */
export const PROBLEMS = {
  'malformed-json': { status: 400, title: 'The request is not valid JSON.' },
  'invalid-request': { status: 400, title: 'Some fields cannot be used as they are.' },
  'not-found': { status: 404, title: 'There is nothing at this address.' },
  'method-not-allowed': { status: 405, title: 'This address does not answer that method.' },
  'request-too-large': { status: 413, title: 'The request is too large.' },
  'unsupported-media-type': { status: 415, title: 'The request must be JSON.' },
  'design-refused': { status: 422, title: 'This design cannot be computed as it stands.' },
  'too-many-requests': { status: 429, title: 'Too many requests in a short time.' },
  'too-many-runs': { status: 429, title: 'Enough statistical runs of yours are under way.' },
  unexpected: { status: 500, title: 'Something went wrong on our side.' },
  busy: { status: 503, title: 'All computing is taken at the moment.' },
  'computation-stopped': { status: 503, title: 'The computation took too long and was stopped.' },
  'not-ready': { status: 503, title: 'The service is not ready.' },
} as const satisfies Record<string, { status: number; title: string }>

export type ProblemCode = keyof typeof PROBLEMS

/** One bad field: `field` is its path in the request, `design.output.voltage`, as a form names its inputs. */
export const FieldProblem = z.object({ field: z.string(), message: z.string() })
export type FieldProblem = z.infer<typeof FieldProblem>

export const Problem = z.object({
  type: z.string().describe('A reference that names the kind of problem, /problems/invalid-request for example.'),
  title: z.string().describe('The kind of problem in a sentence.'),
  status: z.number().int(),
  detail: z.string().optional().describe('What is wrong with this request.'),
  errors: z.array(FieldProblem).optional().describe('Every field that has to change, by its path in the request.'),
  requestId: z.string().optional().describe('To be named when asking for help.'),
})
export type Problem = z.infer<typeof Problem>

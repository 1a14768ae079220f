import express, { type ErrorRequestHandler, type RequestHandler } from 'express'
import { type ParseError, parse as parseWithPositions, printParseErrorCode } from 'jsonc-parser'

import { AppError } from '@/server/errors'

const BODY_LIMIT_KB = 256

/** Reads JSON bodies; anything else that carries a body is turned away. */
export const jsonBody: RequestHandler[] = [
  (req, _res, next) => {
    const hasBody = req.headers['transfer-encoding'] !== undefined || Number(req.headers['content-length'] ?? 0) > 0
    if (hasBody && !req.is(['json', '+json'])) {
      throw new AppError('unsupported-media-type', { detail: 'Send the body with Content-Type: application/json.' })
    }
    next()
  },
  // Not strict: `null` or a number is valid JSON, and the contract says better what is wrong with it.
  express.json({ limit: `${BODY_LIMIT_KB}kb`, strict: false, type: ['json', '+json'] }),
]

/** What body-parser adds to its errors. */
interface BodyError {
  readonly type: string
  readonly status: number
  readonly body?: unknown
}

function isBodyError(error: unknown): error is BodyError {
  return error instanceof Error && 'type' in error && typeof error.type === 'string' && 'status' in error
}

/** Puts failures of reading the body into the words of the contract. */
export const jsonBodyErrors: ErrorRequestHandler = (error: unknown, _req, _res, next) => {
  if (!isBodyError(error)) return next(error)
  switch (error.type) {
    case 'entity.parse.failed':
      return next(new AppError('malformed-json', { detail: whereJsonBreaks(String(error.body)) }))
    case 'entity.too.large':
      return next(new AppError('request-too-large', { detail: `At most ${BODY_LIMIT_KB} kB can be sent at once.` }))
    case 'encoding.unsupported':
    case 'charset.unsupported':
      return next(new AppError('unsupported-media-type', { detail: 'Send plain JSON in UTF-8.' }))
    default:
      // A body cut short, of the wrong length, or badly compressed: the client's doing in every case.
      return next(error.status < 500 ? new AppError('malformed-json', { detail: 'The body was cut short.' }) : error)
  }
}

/** Names line and column of the first place at which the text stops being JSON. */
export function whereJsonBreaks(text: string): string {
  const errors: ParseError[] = []
  parseWithPositions(text, errors, { disallowComments: true, allowTrailingComma: false, allowEmptyContent: false })
  const [first] = errors
  if (!first) return 'The text is not valid JSON.'
  const before = text.slice(0, first.offset).split('\n')
  const column = (before.at(-1)?.length ?? 0) + 1
  const reason = printParseErrorCode(first.error)
    .replace(/(?<=[a-z])(?=[A-Z])/g, ' ')
    .toLowerCase()
  return `Line ${before.length}, column ${column}: ${reason}.`
}

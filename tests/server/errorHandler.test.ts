import { once } from 'node:events'
import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'

import express from 'express'
import { pino } from 'pino'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'

import { AppError } from '@/server/errors'
import { errorHandler } from '@/server/middleware/errorHandler'
import { requestLog } from '@/server/middleware/requestLog'
import { readProblem } from '@/tests/support/problems'

const THROWN: Record<string, unknown> = {
  number: 1,
  null: null,
  nan: NaN,
  text: 'out of cheese',
  nothing: undefined,
  error: new Error('secret inner detail'),
  known: new AppError('busy', { detail: 'Try again in 2 seconds.', headers: { 'Retry-After': '2' } }),
}

let server: Server
let origin: string
const logLines: string[] = []

beforeAll(async () => {
  const app = express()
  app.use(requestLog(pino({ level: 'info' }, { write: (line: string) => void logLines.push(line) })))
  app.get('/partial', (_req, res) => {
    res.write('half')
    throw new Error('broken off')
  })
  app.get('/:kind', async (req) => {
    throw THROWN[req.params.kind]
  })
  app.use(errorHandler)
  server = createServer(app).listen(0, '127.0.0.1')
  await once(server, 'listening')
  origin = `http://127.0.0.1:${(server.address() as AddressInfo).port}`
})

afterAll(() => {
  server.closeAllConnections()
  server.close()
})

describe('the error handler', () => {
  it.each(['number', 'null', 'nan', 'text', 'nothing', 'error'])('answers a thrown %s as a plain 500', async (kind) => {
    const problem = await readProblem(await fetch(`${origin}/${kind}`), 500)
    expect(problem).toMatchObject({ type: '/problems/unexpected', title: 'Something went wrong on our side.' })
    expect(problem.detail).toBeUndefined()
  })

  it('keeps the inside of an unexpected error for the log, under the id that the client is told', async () => {
    const response = await fetch(`${origin}/error`, { headers: { 'X-Request-Id': 'visit-17' } })
    const body = await response.text()
    expect(body).not.toContain('secret')
    expect(body).toContain('visit-17')
    expect(logLines.some((line) => line.includes('secret inner detail') && line.includes('visit-17'))).toBe(true)
  })

  it('answers a known failure with its own status, sentence and headers', async () => {
    const response = await fetch(`${origin}/known`)
    expect(response.headers.get('retry-after')).toBe('2')
    expect(await readProblem(response, 503)).toMatchObject({
      type: '/problems/busy',
      detail: 'Try again in 2 seconds.',
    })
  })

  it('cuts the connection when half an answer is out already, and goes on serving', async () => {
    await expect(fetch(`${origin}/partial`).then((response) => response.text())).rejects.toThrow()
    await readProblem(await fetch(`${origin}/number`), 500)
  })
})

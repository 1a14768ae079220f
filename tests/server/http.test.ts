import { afterAll, beforeAll, describe, expect, it } from 'vitest'

import { buckDesign } from '@/tests/support/designs'
import { readProblem } from '@/tests/support/problems'
import { startTestServer, type TestServer } from '@/tests/support/server'

let server: TestServer
beforeAll(async () => {
  server = await startTestServer()
})
afterAll(() => server.stop())

describe('addresses and methods', () => {
  it.each(['/api/v1/nowhere', '/api/v2/analyses', '/api'])('has nothing at %s and says so', async (path) => {
    const problem = await readProblem(await fetch(`${server.origin}${path}`), 404)
    expect(problem.type).toBe('/problems/not-found')
  })

  it.each([
    ['GET', '/analyses', 'POST, OPTIONS'],
    ['DELETE', '/corners', 'POST, OPTIONS'],
    ['PUT', '/samples', 'GET, HEAD, OPTIONS'],
    ['PATCH', '/samples/sensor-boost', 'GET, HEAD, OPTIONS'],
    ['POST', '/openapi.json', 'GET, HEAD, OPTIONS'],
  ])('refuses %s %s and names what it allows', async (method, path, allowed) => {
    const response = await fetch(`${server.origin}/api/v1${path}`, { method })
    expect(response.headers.get('allow')).toBe(allowed)
    await readProblem(response, 405)
  })

  it('tells what an address allows when asked', async () => {
    const response = await fetch(`${server.origin}/api/v1/analyses`, { method: 'OPTIONS' })
    expect(response.status).toBe(204)
    expect(response.headers.get('allow')).toBe('POST, OPTIONS')
  })

  it('turns away a body that is not JSON', async () => {
    const response = await server.post('/analyses', 'design=buck', {
      headers: { 'Content-Type': 'application/x-www-form-urlencoded' },
    })
    expect((await readProblem(response, 415)).detail).toContain('application/json')
  })
})

describe('every answer', () => {
  it('carries a request id, taken over when it is a plain word and made anew when not', async () => {
    const given = await fetch(`${server.origin}/healthz`, { headers: { 'X-Request-Id': 'bench_42-a' } })
    expect(given.headers.get('x-request-id')).toBe('bench_42-a')
    const odd = await fetch(`${server.origin}/healthz`, { headers: { 'X-Request-Id': 'a b<script>' } })
    expect(odd.headers.get('x-request-id')).toMatch(/^[0-9a-f-]{36}$/)
  })

  it('allows the page nothing from other origins and no script of its own text', async () => {
    const policy = (await fetch(`${server.origin}/`)).headers.get('content-security-policy') ?? ''
    expect(policy).toContain("default-src 'self'")
    expect(policy).toContain("script-src 'self';")
    expect(policy).toContain("frame-ancestors 'none'")
    expect(policy).not.toMatch(/unsafe-eval|https?:/)
  })

  it('names no server software', async () => {
    expect((await fetch(`${server.origin}/healthz`)).headers.get('x-powered-by')).toBeNull()
  })
})

describe('the log', () => {
  it('has one line a request with method, address, status and id, and never a body', async () => {
    const design = buckDesign({ name: 'confidential customer rail' })
    await server.post(
      '/analyses',
      { design, frequencies: [1e3] },
      {
        headers: { 'Content-Type': 'application/json', 'X-Request-Id': 'log-check', Authorization: 'Bearer s3cret' },
      },
    )
    const linesOf = () => server.logLines.filter((line) => line.includes('log-check'))
    // The line is written once the answer is on its way, so it may come a moment after it.
    await expect.poll(() => linesOf().length).toBe(1)
    const lines = linesOf()
    expect(JSON.parse(lines[0] ?? '')).toMatchObject({
      req: { id: 'log-check', method: 'POST', url: '/api/v1/analyses' },
      res: { statusCode: 200 },
    })
    expect(lines[0]).not.toMatch(/confidential|s3cret/)
  })
})

describe('health', () => {
  it('is told apart: the process answers, and it can do its work', async () => {
    expect(await (await fetch(`${server.origin}/healthz`)).json()).toEqual({ status: 'ok' })
    expect(await (await fetch(`${server.origin}/readyz`)).json()).toEqual({ status: 'ok' })
  })
})

import { afterAll, beforeAll, expect, it } from 'vitest'

import { readProblem } from '@/tests/support/problems'
import { startTestServer, type TestServer } from '@/tests/support/server'

let server: TestServer
beforeAll(async () => {
  server = await startTestServer({ rateLimitPerMinute: 3 })
})
afterAll(() => server.stop())

it('turns away the request that is one too many, and says when to come back', async () => {
  const ask = () => fetch(`${server.origin}/api/v1/samples`)
  for (let asked = 0; asked < 3; asked += 1) expect((await ask()).status).toBe(200)
  const response = await ask()
  expect(Number(response.headers.get('retry-after'))).toBeGreaterThan(0)
  const problem = await readProblem(response, 429)
  expect(problem.detail).toBe('At most 3 requests a minute are answered.')
  // The page itself stays within reach.
  expect((await fetch(`${server.origin}/healthz`)).status).toBe(200)
})

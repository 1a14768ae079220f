import { afterEach, describe, expect, it } from 'vitest'

import { readProblem } from '@/tests/support/problems'
import { startTestServer, type TestServer } from '@/tests/support/server'

let server: TestServer
afterEach(() => server.stop())

describe('readiness', () => {
  it('is lost when the compute threads are gone, while the process still answers', async () => {
    server = await startTestServer()
    await server.compute.close()
    const problem = await readProblem(await fetch(`${server.origin}/readyz`), 503)
    expect(problem.detail).toBe('The compute threads are down.')
    expect((await fetch(`${server.origin}/healthz`)).status).toBe(200)
  })

  it('is lost when the database is gone, and says which of the two it is', async () => {
    server = await startTestServer()
    await server.dropDatabase()
    const problem = await readProblem(await fetch(`${server.origin}/readyz`), 503)
    expect(problem.detail).toBe('The database does not answer.')
    await readProblem(await fetch(`${server.origin}/api/v1/samples`), 500)
  })
})

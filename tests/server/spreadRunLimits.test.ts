import { afterEach, describe, expect, it, vi } from 'vitest'

import type { ComputePoolOptions } from '@/server/compute/pool'
import type { SpreadLimits } from '@/server/services/spreadRuns/limits'
import { buckDesign } from '@/tests/support/designs'
import { readProblem } from '@/tests/support/problems'
import { startTestServer, type TestServer } from '@/tests/support/server'
import { askForRun, beginRun, cancelRun, endOfRun, LONG, readRun, runOnce } from '@/tests/support/spreadRuns'

let server: TestServer
afterEach(() => server.stop())

const start = async (spread: Partial<SpreadLimits>, compute: Partial<ComputePoolOptions> = { threads: 2 }) => {
  server = await startTestServer({ compute, spread })
}
const nothingLeft = () =>
  vi.waitFor(() => expect(server.spreadRunner.underWay()).toEqual([]), { timeout: 10_000, interval: 20 })

describe('statistical runs', () => {
  it('of one address are held to two; the third is taken in once one is cancelled', async () => {
    await start({})
    const first = await beginRun(server, LONG)
    await beginRun(server, LONG)
    const problem = await readProblem(await askForRun(server, LONG), 429)
    expect(problem.type).toBe('/problems/too-many-runs')
    expect(problem.detail).toMatch(/^At most 2 statistical runs/)
    await cancelRun(server, first.id)
    await beginRun(server, { samples: 100 })
  })

  it('give their place back when they are refused', async () => {
    await start({ runsOfOneAddress: 1 })
    await readProblem(await askForRun(server, {}, buckDesign({ compensator: null })), 422)
    await endOfRun(server, (await beginRun(server, { samples: 100 })).id)
    await nothingLeft()
    await beginRun(server, { samples: 100 })
  })

  it('wait in a queue with an end, from which they can be cancelled', async () => {
    await start({ runsOfOneAddress: 10, runsAtOnce: 1, queue: 1 })
    const first = await beginRun(server, LONG)
    await runOnce(server, first.id, ({ state }) => state === 'running')
    const second = await beginRun(server, { samples: 100 })
    const response = await askForRun(server, { samples: 100 })
    expect(Number(response.headers.get('retry-after'))).toBeGreaterThan(0)
    expect((await readProblem(response, 503)).type).toBe('/problems/busy')
    expect(await readRun(server, second.id)).toMatchObject({ state: 'queued', startedAt: null })

    expect((await cancelRun(server, second.id)).state).toBe('cancelled')
    const third = await beginRun(server, { samples: 100 })
    expect((await readRun(server, first.id)).state).toBe('running')
    await cancelRun(server, first.id)
    expect((await endOfRun(server, third.id)).state).toBe('done')
  })

  it('take turns, so that a short one is not held up by a long one', async () => {
    await start({ runsAtOnce: 2 })
    const long = await beginRun(server, LONG)
    await runOnce(server, long.id, ({ state }) => state === 'running')
    const short = await beginRun(server, { samples: 100 })
    expect((await endOfRun(server, short.id)).state).toBe('done')
    expect((await readRun(server, long.id)).state).toBe('running')
  })

  it('share an only thread with those who wait for an answer', async () => {
    await start({}, { threads: 1 })
    const { id } = await beginRun(server, LONG)
    await runOnce(server, id, ({ state }) => state === 'running')
    for (let asked = 0; asked < 3; asked += 1) {
      expect((await server.post('/analyses', { design: buckDesign(), frequencies: [1e3] })).status).toBe(200)
    }
    expect((await readRun(server, id)).state).toBe('running')
  })

  it('that take too long are stopped and say so, and nothing of them is left', async () => {
    await start({ timeoutMs: 300 })
    const { id } = await beginRun(server, LONG)
    const failed = await endOfRun(server, id)
    expect(failed).toMatchObject({ state: 'failed', result: null })
    expect(failed.problem).toMatchObject({ type: '/problems/computation-stopped', status: 503 })
    expect(failed.problem!.detail).toMatch(/^No result within 0.3 s\. /)
    await nothingLeft()
    expect((await server.post('/analyses', { design: buckDesign(), frequencies: [1e3] })).status).toBe(200)
  })

  it('whose threads are gone end with a problem, not with silence', async () => {
    await start({})
    const { id } = await beginRun(server, LONG)
    await runOnce(server, id, ({ state }) => state === 'running')
    await server.compute.close()
    expect((await endOfRun(server, id)).problem).toMatchObject({ type: '/problems/not-ready' })
    expect(server.spreadRunner.underWay()).toEqual([])
  })

  it('are not taken in while the server stops', async () => {
    await start({})
    const { id } = await beginRun(server, LONG)
    await server.spreadRunner.close(0)
    await readProblem(await askForRun(server, { samples: 100 }), 503)
    expect((await readRun(server, id)).problem!.detail).toBe('The server was restarted while this ran; start it again.')
  })
})

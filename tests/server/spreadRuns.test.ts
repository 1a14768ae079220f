import { pino } from 'pino'
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest'

import { insertSpreadRun } from '@/db/queries/spreadRuns'
import { sweepSpreadRuns } from '@/server/services/spreadRuns/sweep'
import { buckDesign } from '@/tests/support/designs'
import { fieldsOf, readProblem } from '@/tests/support/problems'
import { startTestServer, type TestServer } from '@/tests/support/server'
import { askForRun, beginRun, cancelRun, endOfRun, LONG, readRun, runOnce, runUrl } from '@/tests/support/spreadRuns'

let server: TestServer
beforeAll(async () => {
  server = await startTestServer({ compute: { threads: 2 } })
})
afterAll(() => server.stop())
afterEach(() => nothingLeft())

/** Threads and places are free again. */
const nothingLeft = () =>
  vi.waitFor(() => expect(server.spreadRunner.underWay()).toEqual([]), { timeout: 10_000, interval: 20 })

describe('a statistical run', () => {
  it('is taken in at once and ends with a result that any page can read again', async () => {
    const { id, ...taken } = await beginRun(server, { samples: 1000, seed: 7 })
    expect(taken).toMatchObject({ state: 'queued', progress: 0, evaluations: { done: 0, total: 1000 }, result: null })
    const done = await endOfRun(server, id)
    expect(done).toMatchObject({ state: 'done', progress: 1, problem: null })
    expect(done.result!.samples).toBe(1000)
    const { all } = done.result!.yields
    expect(all.lower).toBeLessThanOrEqual(all.share)
    expect(all.upper).toBeGreaterThanOrEqual(all.share)
    expect(await readRun(server, id)).toEqual(done)
  })

  it('has the same answer to the same question, also where it is done in several blocks', async () => {
    const options = { samples: 2500, seed: 7 }
    const [first, second] = await Promise.all([beginRun(server, options), beginRun(server, options)])
    expect(first.id).not.toBe(second.id)
    const { result } = await endOfRun(server, first.id)
    expect(result!.samples).toBe(2500)
    expect((await endOfRun(server, second.id)).result).toEqual(result)
  })

  it("counts the evaluations of the Sobol' indices among its work", async () => {
    const { id, evaluations } = await beginRun(server, { samples: 100, sobolSamples: 50, vary: ['inductance', 'esr'] })
    expect(evaluations.total).toBe(100 + 50 * (2 + 2))
    const { result } = await endOfRun(server, id)
    expect(result!.sobol.map(({ figure }) => figure)).toContain('phaseMargin')
  })

  it('moves on, tells what it has so far, and stops when it is cancelled', async () => {
    const { id } = await beginRun(server, LONG)
    const early = await runOnce(server, id, ({ interim, progress }) => interim !== null && progress > 0)
    expect(early).toMatchObject({ state: 'running', finishedAt: null, result: null })
    expect(early.interim!.samples).toBeGreaterThan(0)
    expect(early.interim!.distributions.phaseMargin!.count).toBeLessThanOrEqual(early.interim!.samples)
    const later = await runOnce(server, id, ({ progress }) => progress > early.progress)
    expect(later.progress).toBeLessThan(1)

    const cancelled = await cancelRun(server, id)
    expect(cancelled).toMatchObject({ state: 'cancelled', result: null })
    await nothingLeft()
    expect(await readRun(server, id)).toEqual(cancelled)
    expect(await cancelRun(server, id)).toEqual(cancelled)
  })

  it('stays done when it is cancelled afterwards', async () => {
    const { id } = await beginRun(server, { samples: 100 })
    const done = await endOfRun(server, id)
    expect(await cancelRun(server, id)).toEqual(done)
  })

  it('leaves others their answers', async () => {
    const { id } = await beginRun(server, LONG)
    await runOnce(server, id, ({ state }) => state === 'running')
    expect((await server.post('/analyses', { design: buckDesign() })).status).toBe(200)
    expect((await readRun(server, id)).state).toBe('running')
    await cancelRun(server, id)
  })

  it.each(['7', '00000000-0000-4000-8000-000000000000', "x'; drop table spread_runs; --"])(
    'is not found under %s, an id of nobody',
    async (id) => {
      for (const method of ['GET', 'DELETE']) {
        const problem = await readProblem(await fetch(runUrl(server, encodeURIComponent(id)), { method }), 404)
        expect(problem.detail).toBe('There is no such run; runs are kept for a day.')
      }
    },
  )
})

describe('a run that cannot be', () => {
  it.each([
    [{ samples: 10_001 }, ['options.samples']],
    [{ sobolSamples: 10_001 }, ['options.sobolSamples']],
    [{ samples: 10 }, ['options.samples']],
    [{ samples: '1e400' }, ['options.samples']],
    [{ samples: 1000.5, seed: -1 }, ['options.samples', 'options.seed']],
    [{ distribution: 'lucky', model: 'best' }, ['options.distribution', 'options.model']],
    [{ vary: [] }, ['options.vary']],
    [{ measured: { esr: [0.1, 'more'] } }, ['options.measured.esr.1']],
    ['many', ['options']],
  ])('is refused at its fields: %j', async (options, fields) => {
    const problem = await readProblem(await askForRun(server, options), 400)
    expect(fieldsOf(problem)).toEqual(fields)
    for (const { message } of problem.errors!) expect(message).toMatch(/^[A-Z].*\.$/)
  })

  it('says plainly how many samples there may be', async () => {
    const problem = await readProblem(await askForRun(server, { samples: 20_000 }), 400)
    expect(problem.detail).toBe('options.samples: At most 10000 samples can be run here.')
  })

  it.each([
    ['has no network', buckDesign({ compensator: null }), 'design.compensator'],
    [
      'has an output above its line',
      buckDesign({ output: { voltage: 24, currentMinimum: 0.5, currentMaximum: 8 } }),
      'design.output.voltage',
    ],
  ])('is refused before it begins when the design %s', async (_what, design, field) => {
    const problem = await readProblem(await askForRun(server, {}, design), 422)
    expect(fieldsOf(problem)).toEqual([field])
  })
})

describe('the sweep', () => {
  const sweep = () => sweepSpreadRuns({ db: server.db, runner: server.spreadRunner, logger: pino({ level: 'silent' }) })
  const insert = async (expiresInMs: number) => {
    const id = crypto.randomUUID()
    const expiresAt = new Date(Date.now() + expiresInMs)
    await insertSpreadRun(server.db, { id, evaluationsTotal: 100, request: {}, expiresAt })
    return id
  }

  it('fails what an earlier process has left, and leaves alone what is under way', async () => {
    const { id } = await beginRun(server, LONG)
    const left = await insert(60_000)
    await sweep()
    const failed = await readRun(server, left)
    expect(failed.state).toBe('failed')
    expect(failed.problem!.detail).toBe('The server was restarted while this ran; start it again.')
    expect(['queued', 'running']).toContain((await readRun(server, id)).state)
    await cancelRun(server, id)
  })

  it('removes what has expired, which nobody is told of even before', async () => {
    const expired = await insert(-1)
    await readProblem(await fetch(runUrl(server, expired)), 404)
    const kept = await insert(60_000)
    await sweep()
    const { rows } = await server.db.execute<{ id: string }>('select id from spread_runs')
    const ids = rows.map((row) => row.id)
    expect(ids).toContain(kept)
    expect(ids).not.toContain(expired)
  })
})

import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest'

import { insertSpreadRun } from '@/db/queries/spreadRuns'
import { pino } from 'pino'
import { SpreadRun } from '@/server/contract/spreadRuns'
import { ToleranceCornerSet } from '@/server/contract/toleranceCorners'
import { Simulation } from '@/server/contract/simulations'
import { RootLocus } from '@/server/contract/rootLoci'
import { sweepSpreadRuns } from '@/server/services/spreadRuns/sweep'
import { buckDesign } from '@/tests/support/designs'
import { startTestServer, type TestServer } from '@/tests/support/server'

let server: TestServer
beforeAll(async () => {
  server = await startTestServer({ compute: { threads: 2 } })
})
afterAll(() => server.stop())

const path = (id: string) => `${server.origin}/api/v1/spread-runs/${id}`
const read = async (id: string) => SpreadRun.parse(await (await fetch(path(id))).json())
const begin = async (options: Record<string, unknown>) => {
  const response = await server.post('/spread-runs', { design: buckDesign(), options })
  expect(response.status).toBe(202)
  const run = SpreadRun.parse(await response.json())
  expect(response.headers.get('location')).toBe(`/api/v1/spread-runs/${run.id}`)
  return run
}
const until = (id: string, isWanted: (run: SpreadRun) => boolean) =>
  vi.waitFor(
    async () => {
      const run = await read(id)
      expect(isWanted(run), `${run.state} ${run.progress}`).toBe(true)
      return run
    },
    { timeout: 25_000, interval: 50 },
  )
/** Long enough to be met while it runs. */
const LONG = { samples: 10_000, model: 'switched' }

describe('a statistical run', () => {
  it('ends with a result that any page can read again', async () => {
    const { id } = await begin({ samples: 1000, seed: 7 })
    const done = await until(id, ({ state }) => state === 'done')
    expect(done.progress).toBe(1)
    expect(done.result!.samples).toBe(1000)
    const { all } = done.result!.yields
    expect(all.lower).toBeLessThanOrEqual(all.share)
    expect(all.upper).toBeGreaterThanOrEqual(all.share)
    expect(await read(id)).toEqual(done)
    const again = await begin({ samples: 1000, seed: 7 })
    expect((await until(again.id, ({ state }) => state === 'done')).result).toEqual(done.result)
  })

  it('moves on, leaves others their answers, and stops when it is cancelled', async () => {
    const { id } = await begin(LONG)
    await until(id, ({ progress }) => progress > 0 && progress < 1)
    const asked = performance.now()
    expect((await server.post('/analyses', { design: buckDesign() })).status).toBe(200)
    expect(performance.now() - asked).toBeLessThan(2000)
    const cancelled = SpreadRun.parse(await (await fetch(path(id), { method: 'DELETE' })).json())
    expect(cancelled.state).toBe('cancelled')
    await vi.waitFor(() => expect(server.spreadRunner.underWay()).not.toContain(id), { timeout: 10_000 })
    const later = await read(id)
    expect(later).toMatchObject({ state: 'cancelled', result: null, progress: cancelled.progress })
    // Once more changes nothing.
    expect((await fetch(path(id), { method: 'DELETE' })).status).toBe(200)
  })

  it('is not found under an id that is not one, or is nobody’s', async () => {
    for (const id of ['7', '00000000-0000-4000-8000-000000000000']) {
      for (const method of ['GET', 'DELETE']) expect((await fetch(path(id), { method })).status).toBe(404)
    }
  })

  it('that an earlier process left unfinished is failed in words', async () => {
    const id = crypto.randomUUID()
    const expiresAt = new Date(Date.now() + 60_000)
    await insertSpreadRun(server.db, { id, evaluationsTotal: 100, request: {}, expiresAt })
    await sweepSpreadRuns({ db: server.db, runner: server.spreadRunner, logger: pino({ level: 'silent' }) })
    const run = await read(id)
    expect(run.state).toBe('failed')
    expect(run.problem!.detail).toMatch(/restarted while this ran; start it again/)
  })

  it.each([
    [{ samples: 20_000 }, 'options.samples', /10000/],
    [{ samples: 10 }, 'options.samples', /at least 100/],
    [{ samples: '1e400' }, 'options.samples', /whole number/],
    [{ distribution: 'lucky' }, 'options.distribution', /normal, uniform/],
    [{ vary: [] }, 'options.vary', /Something has to vary/],
  ])('refuses %j at its field', async (options, field, words) => {
    const response = await server.post('/spread-runs', { design: buckDesign(), options })
    expect(response.status).toBe(400)
    const problem = (await response.json()) as { errors: { field: string; message: string }[] }
    const found = problem.errors.find((error) => error.field === field)
    expect(found?.message).toMatch(words)
  })

  it('of one address there are at most two at once; a third is told so', async () => {
    const first = await begin(LONG)
    const second = await begin(LONG)
    const third = await server.post('/spread-runs', { design: buckDesign(), options: LONG })
    expect(third.status).toBe(429)
    for (const { id } of [first, second]) await fetch(path(id), { method: 'DELETE' })
    await vi.waitFor(() => expect(server.spreadRunner.underWay()).toEqual([]), { timeout: 10_000 })
  })
})

describe('what else the spread is made of', () => {
  it('corners over the tolerances, nominal first and the worst named', async () => {
    const response = await server.post('/tolerance-corners', { design: buckDesign(), options: { mostCorners: 64 } })
    const set = ToleranceCornerSet.parse(await response.json())
    expect(set.corners.length).toBeGreaterThan(6)
    expect(set.worst!.slack).toBe(Math.min(...set.corners.map(({ slack }) => slack)))
  })

  it('the closed loop cycle by cycle, and its root locus', async () => {
    const simulation = await server.post('/simulations', {
      design: buckDesign(),
      options: { scenario: { kind: 'load-step' } },
    })
    expect(Simulation.parse(await simulation.json()).readings.peakDeviation).toBeLessThan(0)
    const locus = RootLocus.parse(await (await server.post('/root-loci', { design: buckDesign() })).json())
    expect(locus.gainsDb[locus.present]).toBe(0)
    const bad = await server.post('/simulations', { design: buckDesign(), options: { cycles: 3 } })
    expect(bad.status).toBe(400)
  })
})

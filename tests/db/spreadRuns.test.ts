import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'

import { connectDatabase, type DatabaseConnection } from '@/db/client'
import { migrateDatabase } from '@/db/migrate'
import {
  cancelSpreadRunRow,
  failAbandonedSpreadRuns,
  failSpreadRun,
  findSpreadRun,
  finishSpreadRun,
  insertSpreadRun,
  markSpreadRunRunning,
  updateSpreadRunProgress,
} from '@/db/queries/spreadRuns'
import { spreadRuns } from '@/db/schema'
import { createTestDatabase, type TestDatabase } from '@/tests/support/database'

let database: TestDatabase
let connection: DatabaseConnection
beforeAll(async () => {
  database = await createTestDatabase()
  connection = connectDatabase({ url: database.url, poolSize: 2, onIdleError: () => undefined })
  await migrateDatabase(connection.db)
})
afterAll(async () => {
  await connection.close()
  await database.drop()
})

const newRun = () => ({
  id: crypto.randomUUID(),
  evaluationsTotal: 100,
  request: {},
  expiresAt: new Date(Date.now() + 60_000),
})
async function insert(): Promise<string> {
  return (await insertSpreadRun(connection.db, newRun())).id
}
const stateOf = async (id: string) => (await findSpreadRun(connection.db, id))?.state

describe('the table of statistical runs', () => {
  it.each([
    ['a state that is none', { state: 'lost' as 'queued', finishedAt: new Date() }, 'spread_runs_state_known'],
    ['more done than there is', { evaluationsDone: 101 }, 'spread_runs_evaluations_range'],
    ['a run of nothing', { evaluationsTotal: 0 }, 'spread_runs_evaluations_range'],
    ['an end without a result', { state: 'done', finishedAt: new Date() }, 'spread_runs_result_when_done'],
    ['a result before the end', { result: {} }, 'spread_runs_result_when_done'],
    ['a failure without a reason', { state: 'failed', finishedAt: new Date() }, 'spread_runs_problem_when_failed'],
    ['an end without its time', { state: 'cancelled' }, 'spread_runs_finished_at_end'],
  ] as const)('refuses %s by itself', async (_what, bad, constraint) => {
    await expect(connection.db.insert(spreadRuns).values({ ...newRun(), ...bad })).rejects.toMatchObject({
      cause: { constraint },
    })
  })
})

describe('a run that has ended', () => {
  it.each([
    ['done', (id: string) => finishSpreadRun(connection.db, id, '{"samples":100}')],
    ['failed', (id: string) => failSpreadRun(connection.db, id, { title: 'Stopped.' })],
    ['cancelled', (id: string) => cancelSpreadRunRow(connection.db, id)],
  ])('stays %s whatever comes late', async (state, finish) => {
    const id = await insert()
    expect(await markSpreadRunRunning(connection.db, id)).toBe(true)
    expect(await updateSpreadRunProgress(connection.db, id, { evaluationsDone: 40, interim: '{"samples":40}' })).toBe(
      true,
    )
    await finish(id)
    const ended = await findSpreadRun(connection.db, id)
    expect(ended?.state).toBe(state)
    expect(await markSpreadRunRunning(connection.db, id)).toBe(false)
    expect(await updateSpreadRunProgress(connection.db, id, { evaluationsDone: 50, interim: null })).toBe(false)
    await finishSpreadRun(connection.db, id, '{}')
    await failSpreadRun(connection.db, id, {})
    await cancelSpreadRunRow(connection.db, id)
    await failAbandonedSpreadRuns(connection.db, [], {})
    expect(await findSpreadRun(connection.db, id)).toEqual(ended)
  })
})

it('runs that somebody works on are not taken for abandoned', async () => {
  const [mine, left] = [await insert(), await insert()]
  await failAbandonedSpreadRuns(connection.db, [mine], { title: 'Left.' })
  expect([await stateOf(mine), await stateOf(left)]).toEqual(['queued', 'failed'])
})

it('what can be said so far stays while only the count moves on', async () => {
  const id = await insert()
  await updateSpreadRunProgress(connection.db, id, { evaluationsDone: 10, interim: '{"samples":10}' })
  await updateSpreadRunProgress(connection.db, id, { evaluationsDone: 20, interim: null })
  const [row] = await connection.db.select().from(spreadRuns).where(eq(spreadRuns.id, id))
  expect(row).toMatchObject({ evaluationsDone: 20, interim: { samples: 10 } })
})

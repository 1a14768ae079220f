import { type ChildProcess, spawn } from 'node:child_process'
import { once } from 'node:events'
import { createInterface } from 'node:readline'
import { fileURLToPath } from 'node:url'

import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'

import { connectDatabase } from '@/db/client'
import { migrateDatabase } from '@/db/migrate'
import { createTestDatabase, type TestDatabase } from '@/tests/support/database'
import { beginRun, LONG, readRun, runOnce } from '@/tests/support/spreadRuns'

const root = fileURLToPath(new URL('../..', import.meta.url))
const SENTENCE = 'The server was restarted while this ran; start it again.'

let database: TestDatabase
beforeAll(async () => {
  database = await createTestDatabase()
  const { db, close } = connectDatabase({ url: database.url, poolSize: 1, onIdleError: () => undefined })
  await migrateDatabase(db)
  await close()
})
afterAll(() => database.drop())

let child: ChildProcess | undefined
afterEach(async () => {
  if (child) await end(child, 'SIGKILL')
})

/** The server in a process of its own. @returns where it listens, once it does */
async function startProcess(): Promise<{ origin: string }> {
  const env = { ...process.env, DATABASE_URL: database.url, PORT: '0', COMPUTE_THREADS: '1', LOG_LEVEL: 'info' }
  const started = spawn('node', ['--import', 'tsx', 'server/index.ts'], {
    cwd: root,
    env,
    stdio: ['ignore', 'pipe', 'inherit'],
  })
  child = started
  for await (const line of createInterface({ input: started.stdout })) {
    const { address } = JSON.parse(line) as { address?: string }
    if (address) {
      started.stdout.resume()
      return { origin: address }
    }
  }
  throw new Error('The server ended before it listened.')
}

async function end(one: ChildProcess, signal: NodeJS.Signals): Promise<number | null> {
  if (one.exitCode === null && one.signalCode === null) {
    one.kill(signal)
    await once(one, 'exit')
  }
  return one.exitCode
}

async function startLongRun(server: { origin: string }): Promise<string> {
  const { id } = await beginRun(server, LONG)
  await runOnce(server, id, ({ state }) => state === 'running')
  return id
}

describe('a run that the server does not live to end', () => {
  it('is failed in words by the next server, after a crash', async () => {
    const id = await startLongRun(await startProcess())
    await end(child!, 'SIGKILL')
    const run = await readRun(await startProcess(), id)
    expect(run).toMatchObject({ state: 'failed', result: null })
    expect(run.problem!.detail).toBe(SENTENCE)
  }, 60_000)

  it('is failed in words by the server itself, told to stop, which then ends', async () => {
    const id = await startLongRun(await startProcess())
    expect(await end(child!, 'SIGTERM')).toBe(0)
    const { db, close } = connectDatabase({ url: database.url, poolSize: 1, onIdleError: () => undefined })
    const { rows } = await db.execute<{ state: string; detail: string }>(
      `select state, problem->>'detail' as detail from spread_runs where id = '${id}'`,
    )
    await close()
    expect(rows).toEqual([{ state: 'failed', detail: SENTENCE }])
  }, 60_000)
})

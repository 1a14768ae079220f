import { once } from 'node:events'
import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'
import { fileURLToPath } from 'node:url'

import { pino } from 'pino'

import { connectDatabase, type Database } from '@/db/client'
import { migrateDatabase } from '@/db/migrate'
import { seedSamples } from '@/db/seed/seedSamples'
import { createApp } from '@/server/app'
import { SHARED_LIMITS, type SpreadLimits } from '@/server/services/spreadRuns/limits'
import { createSpreadRunner, type SpreadRunner } from '@/server/services/spreadRuns/runner'
import { type ComputePool, type ComputePoolOptions, createComputePool } from '@/server/compute/pool'
import { createTestDatabase } from '@/tests/support/database'

export interface TestServer {
  readonly origin: string
  readonly db: Database
  readonly compute: ComputePool
  readonly spreadRunner: SpreadRunner
  /** Every line that the server has logged. */
  readonly logLines: readonly string[]
  readonly dropDatabase: () => Promise<void>
  readonly post: (path: string, body: unknown, init?: RequestInit) => Promise<Response>
  readonly stop: () => Promise<void>
}

interface TestServerOptions {
  readonly compute?: Partial<ComputePoolOptions>
  readonly rateLimitPerMinute?: number
  readonly spread?: Partial<SpreadLimits>
}

const webRoot = fileURLToPath(new URL('./web', import.meta.url))

/** The real app on a free port with real worker threads and a seeded database of its own. */
export async function startTestServer({
  compute: computeOptions,
  rateLimitPerMinute = 1_000_000,
  spread,
}: TestServerOptions = {}): Promise<TestServer> {
  const database = await createTestDatabase()
  const connection = connectDatabase({ url: database.url, poolSize: 2, onIdleError: () => undefined })
  await migrateDatabase(connection.db)
  await seedSamples(connection.db)

  const logLines: string[] = []
  const logger = pino({ level: 'info' }, { write: (line: string) => void logLines.push(line) })
  const compute = createComputePool({ threads: 1, queue: 50, timeoutMs: 20_000, ...computeOptions })
  const env = { RATE_LIMIT_PER_MINUTE: rateLimitPerMinute, TRUSTED_PROXIES: 0, SPREAD_SAMPLES_MAX: 10_000 }
  const { db } = connection
  const limits = { ...SHARED_LIMITS, timeoutMs: 60_000, ...spread }
  const spreadRunner = createSpreadRunner({ db, compute, logger, limits })
  const server = createServer(createApp({ db, compute, spreadRunner, logger, env, webRoot }))
  server.listen(0, '127.0.0.1')
  await once(server, 'listening')
  const origin = `http://127.0.0.1:${(server.address() as AddressInfo).port}`

  return {
    origin,
    db,
    compute,
    spreadRunner,
    logLines,
    dropDatabase: database.drop,
    post: (path, body, init) =>
      fetch(`${origin}/api/v1${path}`, {
        method: 'POST',
        headers: { 'Content-Type': 'application/json' },
        body: typeof body === 'string' ? body : JSON.stringify(body),
        ...init,
      }),
    stop: async () => {
      server.closeAllConnections()
      server.close()
      await spreadRunner.close(0)
      await compute.close()
      await connection.close()
      await database.drop()
    },
  }
}

import { once } from 'node:events'
import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'
import { fileURLToPath } from 'node:url'

import { connectDatabase } from '@/db/client'
import { createApp } from '@/server/app'
import { createComputePool } from '@/server/compute/pool'
import { type Env, EnvError, readEnv } from '@/server/env'
import { createLogger } from '@/server/logger'
import { SHARED_LIMITS } from '@/server/services/spreadRuns/limits'
import { createSpreadRunner } from '@/server/services/spreadRuns/runner'
import { startSweeping } from '@/server/services/spreadRuns/sweep'
import { closeOnSignal } from '@/server/shutdown'

// Holds from the sources (server/) and from the bundle (build/): both lie one step below the root.
const webRoot = fileURLToPath(new URL('../dist', import.meta.url))

function readEnvOrExit(): Env {
  try {
    return readEnv(process.env)
  } catch (error) {
    if (!(error instanceof EnvError)) throw error
    console.error(error.message)
    process.exit(1)
  }
}

const env = readEnvOrExit()
const logger = createLogger(env)
const database = connectDatabase({
  url: env.DATABASE_URL,
  poolSize: env.DATABASE_POOL_SIZE,
  onIdleError: (error) => logger.error({ err: error }, 'a database connection broke'),
})
const compute = createComputePool({
  threads: env.COMPUTE_THREADS,
  queue: env.COMPUTE_QUEUE,
  timeoutMs: env.COMPUTE_TIMEOUT_MS,
})
const { db } = database
const limits = { ...SHARED_LIMITS, timeoutMs: env.SPREAD_TIMEOUT_MS }
const spreadRunner = createSpreadRunner({ db, compute, logger, limits })
const server = createServer(createApp({ db, compute, spreadRunner, logger, env, webRoot }))

server.on('error', (error: NodeJS.ErrnoException) => {
  const isTaken = error.code === 'EADDRINUSE'
  console.error(
    isTaken
      ? `Port ${env.PORT} on ${env.HOST} is taken. Stop what uses it, or set PORT to another one.`
      : error.message,
  )
  process.exit(1)
})

await compute.warmUp()
const stopSweeping = await startSweeping({ db, runner: spreadRunner, logger })
closeOnSignal({ server, compute, spreadRunner, stopSweeping, database, logger, graceMs: env.SHUTDOWN_GRACE_MS })
server.listen(env.PORT, env.HOST)
await once(server, 'listening')

const { port } = server.address() as AddressInfo
/** Where the product can be opened, once it is ready. */
export const address = `http://${env.HOST}:${port}`
logger.info({ address }, 'listening')

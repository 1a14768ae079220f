import { type ChildProcess, execFile, spawn } from 'node:child_process'
import { once } from 'node:events'
import { availableParallelism } from 'node:os'
import { setTimeout } from 'node:timers/promises'
import { promisify } from 'node:util'

import { createTestDatabase } from '@/tests/support/database'

export interface Product {
  readonly origin: string
  readonly pid: number
  readonly threads: number
  readonly stop: () => Promise<void>
}

const START_LIMIT_MS = 60_000

/** Starts the built product as it runs for its users, with a database of its own. */
export async function startProduct(): Promise<Product> {
  const port = process.env.TEST_PORT
  if (!port) throw new Error('TEST_PORT is not set: run this with npm run bench or npm run screenshots.')
  const database = await createTestDatabase()
  const threads = availableParallelism()
  const env = {
    ...process.env,
    NODE_ENV: 'production' as const,
    DATABASE_URL: database.url,
    PORT: port,
    COMPUTE_THREADS: String(threads),
    LOG_LEVEL: 'warn',
    RATE_LIMIT_PER_MINUTE: '1000000',
  }
  await promisify(execFile)('node', ['build/prepare.js'], { env })
  const child = spawn('node', ['--enable-source-maps', 'build/index.js'], { env, stdio: 'inherit' })
  const stop = async () => {
    child.kill('SIGTERM')
    if (child.exitCode === null) await once(child, 'exit')
    await database.drop()
  }
  const origin = `http://127.0.0.1:${port}`
  if (!(await becomesReady(child, origin))) {
    await stop()
    throw new Error('The product did not start.')
  }
  return { origin, pid: child.pid ?? 0, threads, stop }
}

async function becomesReady(child: ChildProcess, origin: string): Promise<boolean> {
  for (const limit = Date.now() + START_LIMIT_MS; Date.now() < limit; await setTimeout(100)) {
    if (child.exitCode !== null) return false
    const response = await fetch(`${origin}/readyz`).catch(() => null)
    if (response?.ok) return true
  }
  return false
}

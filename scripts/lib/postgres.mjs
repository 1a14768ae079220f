import { spawnSync } from 'node:child_process'
import { join } from 'node:path'

import { freePort } from './ports.mjs'
import { ROOT } from './run.mjs'

const TEST_PORT = 54330

function pgScript(action, env) {
  const result = spawnSync('bash', [join(ROOT, 'scripts/pg.sh'), action], {
    cwd: ROOT,
    encoding: 'utf8',
    stdio: ['ignore', 'pipe', 'inherit'],
    env: { ...process.env, ...env },
  })
  return { code: result.status, output: (result.stdout ?? '').trim() }
}

/**
 * Starts the project's own PostgreSQL, installing Debian's server when there is none.
 * @returns its address, and a way to stop it that leaves alone what was running before
 */
export function startPostgres(env = {}) {
  const wasRunning = pgScript('status', env).code === 0
  const { code, output } = pgScript('start', env)
  if (code !== 0) throw new Error('PostgreSQL could not be started; the lines above say why.')
  return { url: output.split('\n').at(-1), stop: () => wasRunning || pgScript('stop', env) }
}

/** A second cluster for the tests: apart from the product's data, and without waiting for the disk. */
export async function startTestPostgres() {
  const env = { PGDATA_ROOT: join(ROOT, '.data/test'), PG_FAST: '1', PG_DB: 'steadrail_admin' }
  const [, port = await freePort(TEST_PORT)] = /running on (\d+)/.exec(pgScript('status', env).output) ?? []
  return startPostgres({ ...env, PGPORT: String(port) })
}

/**
 * Runs a command beside the test PostgreSQL: node scripts/withDatabase.mjs [--build] command …
 * The command finds the server in DATABASE_ADMIN_URL and a port for the product in TEST_PORT. PostgreSQL keeps running
 * afterwards, since others may be using it; PGDATA_ROOT=.data/test bash scripts/pg.sh stop ends it.
 */
import { buildAll } from './lib/build.mjs'
import { ensurePackages } from './lib/packages.mjs'
import { freePort } from './lib/ports.mjs'
import { startTestPostgres } from './lib/postgres.mjs'
import { main, run } from './lib/run.mjs'

const WISHED_PORT = 3199

await main(async () => {
  const words = process.argv.slice(2)
  const needsBuild = words[0] === '--build'
  const [command, ...args] = needsBuild ? words.slice(1) : words
  await ensurePackages()
  if (needsBuild) await buildAll()
  const { url } = await startTestPostgres()
  const TEST_PORT = process.env.TEST_PORT ?? String(await freePort(WISHED_PORT))
  process.exitCode = await run(command, args, { env: { DATABASE_ADMIN_URL: url, TEST_PORT } })
})

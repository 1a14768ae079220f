/** From a bare checkout to a verdict: every check there is, and one last line that sums them up. */
import { mkdir, rm } from 'node:fs/promises'
import { join } from 'node:path'

import { buildAll } from './lib/build.mjs'
import { ensurePackages } from './lib/packages.mjs'
import { freePort } from './lib/ports.mjs'
import { startTestPostgres } from './lib/postgres.mjs'
import { ROOT, run } from './lib/run.mjs'
import { ensureSystemPackages } from './lib/system.mjs'
import { REPORTS, tallyPlaywright, tallyVitest } from './lib/tally.mjs'

const WISHED_PORT = 3199
const total = { passed: 0, failed: 0 }
const failures = []

function fail(what) {
  total.failed += 1
  failures.push(what)
}

/** A check that has no tests to count: it is right, or it is one failure. */
async function gate(name, command, ...args) {
  console.log(`\n== ${name}`)
  if ((await run(command, args)) !== 0) fail(name)
}

/** A run of tests that leaves a report behind; without one, or with nothing in it, it is one failure. */
async function suite(name, tally, command, args, env) {
  console.log(`\n== ${name}`)
  const code = await run(command, args, { env })
  const { passed, failed } = await tally().catch(() => ({ passed: 0, failed: 0 }))
  total.passed += passed
  total.failed += failed
  if (failed > 0) failures.push(`${name}: ${failed}`)
  else if (code !== 0 || passed === 0) fail(`${name} did not run to its end`)
}

const vitest = (name, project, env) =>
  suite(
    name,
    () => tallyVitest(`${project}.json`),
    'vitest',
    [
      'run',
      '--project',
      project,
      '--reporter=default',
      '--reporter=json',
      `--outputFile.json=${REPORTS}/${project}.json`,
    ],
    env,
  )

async function checkEverything() {
  await ensurePackages()
  await ensureSystemPackages()
  const { url, stop } = await startTestPostgres()
  try {
    const env = { DATABASE_ADMIN_URL: url, TEST_PORT: String(await freePort(WISHED_PORT)) }
    await rm(join(ROOT, REPORTS), { recursive: true, force: true })
    await mkdir(join(ROOT, REPORTS), { recursive: true })
    await gate('Types of the routes', 'npm', 'run', '--silent', 'types:routes')
    await gate('Format', 'prettier', '--check', '.')
    await gate('Lint', 'eslint', '.', '--max-warnings', '0')
    await gate('Types of the client', 'tsc', '-p', 'tsconfig.json')
    await gate('Types of the server and the engine', 'tsc', '-p', 'tsconfig.server.json')
    await vitest('Unit tests', 'unit', env)
    await vitest('API and database tests', 'api', env)
    console.log('\n== Build')
    await buildAll()
    await suite('Browser tests', () => tallyPlaywright('browser.json'), 'playwright', ['test'], {
      ...env,
      PLAYWRIGHT_REPORT: `${REPORTS}/browser.json`,
    })
  } finally {
    stop()
  }
}

await checkEverything().catch((error) => {
  console.error(`\n${error.message}`)
  fail(error.message)
})
for (const failure of failures) console.log(`Failed: ${failure}`)
process.exitCode = total.failed > 0 ? 1 : 0
console.log(`\n${total.passed} passed, ${total.failed} failed`)

import { readFile } from 'node:fs/promises'
import { join } from 'node:path'

import { ROOT } from './run.mjs'

export const REPORTS = '.data/reports'

async function readReport(name) {
  return JSON.parse(await readFile(join(ROOT, REPORTS, name), 'utf8'))
}

/** A skipped test proves nothing, so it counts as failed; so does a file that could not even be loaded. */
export async function tallyVitest(name) {
  const { numPassedTests, numFailedTests, numPendingTests, numTodoTests, testResults } = await readReport(name)
  const broken = testResults.filter(
    ({ status, assertionResults }) => status === 'failed' && assertionResults.length === 0,
  )
  return { passed: numPassedTests, failed: numFailedTests + numPendingTests + numTodoTests + broken.length }
}

export async function tallyPlaywright(name) {
  const { stats, errors } = await readReport(name)
  return { passed: stats.expected, failed: stats.unexpected + stats.flaky + stats.skipped + errors.length }
}

import { readFile } from 'node:fs/promises'
import { join } from 'node:path'

import { mustRun, ROOT } from './run.mjs'

async function packagesOf(lockfile) {
  const text = await readFile(join(ROOT, lockfile), 'utf8').catch(() => '{}')
  return JSON.parse(text).packages ?? {}
}

/**
 * Whether every package of the lockfile is there in its version. npm keeps a list of what it has installed, written
 * last, so an install that was cut short does not count. Optional packages belong to other machines and may be missing.
 */
async function arePackagesInstalled() {
  const [wanted, present] = [await packagesOf('package-lock.json'), await packagesOf('node_modules/.package-lock.json')]
  return Object.entries(wanted).every(([path, { version, optional }]) => {
    if (path === '') return true
    return present[path] ? present[path].version === version : optional === true
  })
}

/** Installs the packages when one is missing or of another version than the lockfile's. */
export async function ensurePackages() {
  if (await arePackagesInstalled()) return
  console.log('Installing packages.')
  // Building needs the development packages too, whatever NODE_ENV says.
  await mustRun('npm', ['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'], {
    failure: 'The packages could not be installed; the lines above say why.',
  })
}

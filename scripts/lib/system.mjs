import { existsSync } from 'node:fs'
import { spawnSync } from 'node:child_process'

import { run } from './run.mjs'

/** What the tests need of Debian beside PostgreSQL, which scripts/pg.sh sees to. */
const NEEDED = [
  { name: 'chromium', isThere: () => existsSync(process.env.CHROMIUM ?? '/usr/bin/chromium') },
  {
    name: 'python3-scipy',
    isThere: () => spawnSync('/usr/bin/python3', ['-c', 'import scipy'], { stdio: 'ignore' }).status === 0,
  },
]

/** Installs the Debian packages that the tests lack. @throws Error saying what to install when that is not allowed */
export async function ensureSystemPackages() {
  const missing = NEEDED.filter(({ isThere }) => !isThere()).map(({ name }) => name)
  if (missing.length === 0) return
  const isRoot = process.getuid?.() === 0
  const sudo = isRoot ? [] : ['sudo', '-n']
  const advice = `Install once with: sudo apt-get install ${missing.join(' ')}`
  if (!isRoot && spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' }).status !== 0) {
    throw new Error(`The tests need packages of Debian that are missing here. ${advice}`)
  }
  console.log(`Installing ${missing.join(' and ')} from Debian's packages.`)
  const apt = (...args) => {
    const [program, ...rest] = [...sudo, 'env', 'DEBIAN_FRONTEND=noninteractive', 'apt-get', '-qq', ...args]
    return run(program, rest)
  }
  await apt('update')
  const code = await apt('install', '-y', '--no-install-recommends', '-o=Dpkg::Use-Pty=0', ...missing)
  if (code !== 0) throw new Error(`Debian's packages could not be installed. ${advice}`)
}

import { readdir, readFile, rm, writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { promisify } from 'node:util'
import { brotliCompress, constants, gzip } from 'node:zlib'

import { mustRun, ROOT } from './run.mjs'
import { whenChanged } from './stamps.mjs'

const SHARED = ['converters', 'server/contract', 'package-lock.json', 'tsconfig.json', 'scripts/lib/build.mjs']
const WEB_SOURCES = [
  'app',
  'public',
  'components',
  'hooks',
  'constants',
  'assets',
  'app.json',
  'metro.config.cjs',
  ...SHARED,
]
const SERVER_SOURCES = ['server', 'db', ...SHARED]
const COMPRESSIBLE = /\.(js|css|html|svg|json|ico|ttf|map)$/

/** Builds web target and server, each only when its sources have changed. */
export async function buildAll() {
  await whenChanged('build/.built', SERVER_SOURCES, buildServer)
  await whenChanged('dist/.built', WEB_SOURCES, buildWeb)
}

async function buildServer() {
  console.log('Building the server.')
  await rm(join(ROOT, 'build'), { recursive: true, force: true })
  // Flat, so that a file finds the project's root one step above itself, as it does among the sources.
  const entries = ['index=server/index.ts', 'worker=server/compute/worker.ts', 'prepare=db/prepare.ts']
  const options = ['--bundle', '--platform=node', '--format=esm', '--target=node20', '--packages=external']
  const alias = `--alias:@=${ROOT.replace(/\/$/, '')}`
  const rest = ['--outdir=build', '--sourcemap', '--log-level=warning']
  await mustRun('esbuild', [...entries, ...options, alias, ...rest], { failure: 'The server could not be built.' })
}

async function buildWeb() {
  console.log('Building the web target.')
  await rm(join(ROOT, 'dist'), { recursive: true, force: true })
  // The bundler's cache stays with the project, where whoever builds may write.
  const TMPDIR = join(ROOT, '.data/bundler')
  await mustRun('mkdir', ['-p', TMPDIR], { failure: `${TMPDIR} could not be made.` })
  await mustRun('expo', ['export', '--platform', 'web', '--output-dir', 'dist'], {
    env: { EXPO_OFFLINE: '1', EXPO_NO_TELEMETRY: '1', CI: '1', TMPDIR },
    failure: 'The web target could not be built; the lines above say why.',
  })
  await compressFolder(join(ROOT, 'dist'))
}

/** Writes file.br and file.gz beside each file that gains from it, so that no request has to wait for the work. */
async function compressFolder(folder) {
  for (const entry of await readdir(folder, { withFileTypes: true, recursive: true })) {
    if (!entry.isFile() || !COMPRESSIBLE.test(entry.name)) continue
    const path = join(entry.parentPath, entry.name)
    const content = await readFile(path)
    const params = { [constants.BROTLI_PARAM_QUALITY]: 9, [constants.BROTLI_PARAM_SIZE_HINT]: content.length }
    await writeFile(`${path}.br`, await promisify(brotliCompress)(content, { params }))
    await writeFile(`${path}.gz`, await promisify(gzip)(content, { level: 9 }))
  }
}

import { createHash } from 'node:crypto'
import { mkdir, readdir, readFile, writeFile } from 'node:fs/promises'
import { dirname, join } from 'node:path'

import { ROOT } from './run.mjs'

async function filesOf(path) {
  const entries = await readdir(join(ROOT, path), { withFileTypes: true }).catch((error) => {
    if (error.code === 'ENOTDIR') return null
    if (error.code === 'ENOENT') return []
    throw error
  })
  if (entries === null) return [path]
  const nested = await Promise.all(entries.map((entry) => filesOf(join(path, entry.name))))
  return nested.flat().sort()
}

/** A hash over names and contents of all files below these paths, and over the version of Node.js. */
export async function hashOf(paths) {
  const hash = createHash('sha256').update(process.version)
  for (const path of paths) {
    for (const file of await filesOf(path)) hash.update(`\0${file}\0`).update(await readFile(join(ROOT, file)))
  }
  return hash.digest('hex')
}

/** Does the work unless the stamp file says that it was done from the same sources. */
export async function whenChanged(stampFile, sources, work) {
  const stamp = join(ROOT, stampFile)
  const hash = await hashOf(sources)
  if ((await readFile(stamp, 'utf8').catch(() => '')) === hash) return
  await work()
  await mkdir(dirname(stamp), { recursive: true })
  await writeFile(stamp, hash)
}

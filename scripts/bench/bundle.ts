import { readdir, readFile } from 'node:fs/promises'
import { fileURLToPath } from 'node:url'

import type { BenchLine } from '@/scripts/bench/line'

const webRoot = fileURLToPath(new URL('../../dist/', import.meta.url))

/** The scripts that the first page asks for, as they travel. */
export async function measureBundle(): Promise<BenchLine[]> {
  const page = await readFile(`${webRoot}index.html`, 'utf8')
  const scripts = [...page.matchAll(/<script[^>]*\ssrc="\/([^"]+)"/g)].map(([, path]) => path)
  if (scripts.length === 0) throw new Error(`No script in index.html among ${await readdir(webRoot)}.`)
  const sizes = await Promise.all(scripts.map(async (path) => (await readFile(`${webRoot}${path}.gz`)).length))
  const total = sizes.reduce((sum, size) => sum + size, 0)
  return [{ what: 'Script of the first page, gzip', measured: total / 1000, unit: 'kB', goal: 550 }]
}

import { createHash } from 'node:crypto'
import { mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises'
import { createServer, type Server } from 'node:http'
import { once } from 'node:events'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { brotliCompressSync } from 'node:zlib'

import express from 'express'
import { pino } from 'pino'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'

import { errorHandler } from '@/server/middleware/errorHandler'
import { notFound } from '@/server/middleware/notFound'
import { requestLog } from '@/server/middleware/requestLog'
import { webApp } from '@/server/middleware/webApp'
import { readProblem } from '@/tests/support/problems'

const SCRIPT = 'console.log("the whole product")'.repeat(50)
const scriptName = `entry-${createHash('md5').update(SCRIPT).digest('hex')}.js`
const scriptPath = `/_expo/static/js/web/${scriptName}`

let folder: string
let server: Server
let origin: string

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'web-'))
  await mkdir(join(folder, '_expo/static/js/web'), { recursive: true })
  await writeFile(join(folder, 'index.html'), '<!doctype html><title>Steadrail</title>')
  await writeFile(join(folder, scriptPath), SCRIPT)
  await writeFile(join(folder, `${scriptPath}.br`), brotliCompressSync(SCRIPT))
  const app = express()
  app.use(requestLog(pino({ level: 'silent' })), webApp(folder), notFound, errorHandler)
  server = createServer(app).listen(0, '127.0.0.1')
  await once(server, 'listening')
  origin = `http://127.0.0.1:${(server.address() as AddressInfo).port}`
})

afterAll(async () => {
  server.closeAllConnections()
  server.close()
  await rm(folder, { recursive: true })
})

describe('the web build', () => {
  it.each(['/', '/design/stage', '/design/loop?from=link'])(
    'answers %s with the page, asked for anew each time',
    async (path) => {
      const response = await fetch(`${origin}${path}`, { headers: { Accept: 'text/html' } })
      expect(response.status).toBe(200)
      expect(response.headers.get('cache-control')).toBe('no-cache')
      expect(await response.text()).toContain('<title>Steadrail</title>')
    },
  )

  it('lets hashed files be kept for good, and sends them compressed', async () => {
    const response = await fetch(`${origin}${scriptPath}`, { headers: { 'Accept-Encoding': 'gzip, br' } })
    expect(response.headers.get('cache-control')).toBe('public, max-age=31536000, immutable')
    expect(response.headers.get('content-encoding')).toBe('br')
    expect(await response.text()).toBe(SCRIPT)
  })

  it('has nothing where a file is missing, rather than the page', async () => {
    await readProblem(await fetch(`${origin}/_expo/static/js/web/entry-gone.js`), 404)
  })

  it('does not leave its folder', async () => {
    const response = await fetch(`${origin}/..%2f..%2fetc%2fpasswd.txt`)
    expect([400, 403, 404]).toContain(response.status)
  })
})

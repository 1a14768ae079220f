/** The product with fast refresh in the browser and a server that restarts when its sources change, on one address. */
import { spawn } from 'node:child_process'

import { ensurePackages } from './lib/packages.mjs'
import { freePort } from './lib/ports.mjs'
import { startPostgres } from './lib/postgres.mjs'
import { main, mustRun, ROOT } from './lib/run.mjs'

const API_PORT = 3001

await main(async () => {
  await ensurePackages()
  const database = process.env.DATABASE_URL ? { url: process.env.DATABASE_URL, stop: () => {} } : startPostgres()
  const env = { ...process.env, DATABASE_URL: database.url }
  await mustRun('node', ['--import', 'tsx', 'db/prepare.ts'], { env, failure: 'The database could not be prepared.' })

  const apiPort = await freePort(API_PORT)
  const start = (program, args, more) =>
    spawn(`${ROOT}node_modules/.bin/${program}`, args, { cwd: ROOT, stdio: 'inherit', env: { ...env, ...more } })
  const children = [
    start('tsx', ['watch', '--clear-screen=false', 'server/index.ts'], { PORT: String(apiPort) }),
    start('expo', ['start', '--port', process.env.PORT || '3000', '--localhost'], {
      API_ORIGIN: `http://127.0.0.1:${apiPort}`,
      EXPO_OFFLINE: '1',
      EXPO_NO_TELEMETRY: '1',
    }),
  ]
  console.log(`\nOpen http://localhost:${process.env.PORT || '3000'}. Ctrl-C stops both servers.\n`)
  const stopAll = () => children.forEach((child) => child.kill('SIGTERM'))
  for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, stopAll)
  await Promise.all(children.map((child) => new Promise((resolve) => child.on('exit', resolve).on('exit', stopAll))))
  database.stop()
})

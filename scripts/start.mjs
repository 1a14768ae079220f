/** From a bare checkout to the running product. Uses nothing but Node.js, so that it runs before any install. */
import { buildAll } from './lib/build.mjs'
import { ensurePackages } from './lib/packages.mjs'
import { isFree } from './lib/ports.mjs'
import { startPostgres } from './lib/postgres.mjs'
import { main } from './lib/run.mjs'

await main(async () => {
  const host = process.env.HOST || '127.0.0.1'
  const port = process.env.PORT || '3000'
  if (port !== '0' && !(await isFree(Number(port), host))) {
    throw new Error(`Port ${port} on ${host} is taken. Stop what uses it, or start with another: PORT=3005 npm start`)
  }
  await ensurePackages()
  await buildAll()
  process.env.NODE_ENV ||= 'production'
  if (!process.env.DATABASE_URL) {
    const { url, stop } = startPostgres()
    process.env.DATABASE_URL = url
    process.on('exit', stop)
  }
  process.setSourceMapsEnabled(true)
  await import('../build/prepare.js')
  const { address } = await import('../build/index.js')
  console.log(`\nSteadrail is running at ${address}\nCtrl-C stops it.\n`)
})

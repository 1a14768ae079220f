import { buildAll } from './lib/build.mjs'
import { ensurePackages } from './lib/packages.mjs'
import { main } from './lib/run.mjs'

await main(async () => {
  await ensurePackages()
  await buildAll()
})

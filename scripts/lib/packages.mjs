import { mustRun } from './run.mjs'
import { whenChanged } from './stamps.mjs'

/** Installs the packages when they are missing or the lockfile has changed. */
export async function ensurePackages() {
  await whenChanged('node_modules/.installed', ['package-lock.json', '.npmrc'], async () => {
    console.log('Installing packages.')
    // Building needs the development packages too, whatever NODE_ENV says.
    await mustRun('npm', ['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'], {
      failure: 'The packages could not be installed; the lines above say why.',
    })
  })
}

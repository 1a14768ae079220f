import { spawn } from 'node:child_process'
import { fileURLToPath } from 'node:url'

export const ROOT = fileURLToPath(new URL('../..', import.meta.url))

/**
 * Runs a command from the project's root with its output on the screen, programs of installed packages included.
 * @returns its exit code; 127 when there is no such program
 */
export function run(command, args, { env = {} } = {}) {
  const path = `${ROOT}node_modules/.bin:${process.env.PATH}`
  const child = spawn(command, args, { cwd: ROOT, stdio: 'inherit', env: { ...process.env, PATH: path, ...env } })
  return new Promise((resolve) => {
    child.on('error', (error) => {
      console.error(error.message)
      resolve(127)
    })
    child.on('exit', (code, signal) => resolve(code ?? (signal === 'SIGINT' ? 130 : 1)))
  })
}

/** As `run`, but a failure ends the work. @throws Error with the given sentence */
export async function mustRun(command, args, { env, failure }) {
  const code = await run(command, args, { env })
  if (code !== 0) throw new Error(failure)
}

/** Runs a script's work; a failure is told in its own sentence, without a stack. */
export async function main(work) {
  try {
    await work()
  } catch (error) {
    console.error(`\n${error.message}`)
    process.exitCode = 1
  }
}

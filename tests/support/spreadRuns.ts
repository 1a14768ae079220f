import { expect, vi } from 'vitest'

import { SpreadRun, type SpreadRunRequestInput } from '@/server/contract/spreadRuns'
import { buckDesign } from '@/tests/support/designs'

type Server = { readonly origin: string }

/** Some seconds of both cores: long enough to be met while it runs. */
export const LONG: SpreadRunRequestInput['options'] = { samples: 10_000, model: 'switched' }

export const runUrl = ({ origin }: Server, id: string) => `${origin}/api/v1/spread-runs/${id}`

export async function readRun(server: Server, id: string): Promise<SpreadRun> {
  const response = await fetch(runUrl(server, id))
  expect(response.status).toBe(200)
  return SpreadRun.parse(await response.json())
}

export async function cancelRun(server: Server, id: string): Promise<SpreadRun> {
  const response = await fetch(runUrl(server, id), { method: 'DELETE' })
  expect(response.status).toBe(200)
  return SpreadRun.parse(await response.json())
}

export const askForRun = ({ origin }: Server, options: unknown, design: unknown = buckDesign()) =>
  fetch(`${origin}/api/v1/spread-runs`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify({ design, options }),
  })

/** Starts a run that has to be taken in. */
export async function beginRun(server: Server, options: SpreadRunRequestInput['options']): Promise<SpreadRun> {
  const response = await askForRun(server, options)
  expect(response.status).toBe(202)
  const run = SpreadRun.parse(await response.json())
  expect(response.headers.get('location')).toBe(`/api/v1/spread-runs/${run.id}`)
  return run
}

/** Asks for a run again and again until it is as wanted. */
export const runOnce = (server: Server, id: string, isWanted: (run: SpreadRun) => boolean): Promise<SpreadRun> =>
  vi.waitFor(
    async () => {
      const run = await readRun(server, id)
      expect(isWanted(run), `${run.state} ${run.progress}`).toBe(true)
      return run
    },
    { timeout: 25_000, interval: 50 },
  )

export const endOfRun = (server: Server, id: string): Promise<SpreadRun> =>
  runOnce(server, id, ({ finishedAt }) => finishedAt !== null)

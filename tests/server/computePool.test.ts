import { afterEach, describe, expect, it } from 'vitest'

import { DesignDocument } from '@/converters/document'
import { type ComputePool, createComputePool } from '@/server/compute/pool'
import type { TaskRequest } from '@/server/compute/messages'
import { warmUpRequest } from '@/server/compute/warmUp'
import { buckDesign } from '@/tests/support/designs'
import { readProblem } from '@/tests/support/problems'
import { startTestServer } from '@/tests/support/server'

let pool: ComputePool | undefined
afterEach(async () => {
  await pool?.close()
  pool = undefined
})

const analysis = (frequencies: number): TaskRequest => ({
  task: 'analysis',
  input: {
    design: DesignDocument.parse(buckDesign()),
    frequencies: Array.from({ length: frequencies }, (_, index) => 10 + index),
  },
})
const codeOf = (promise: Promise<unknown>) =>
  promise.then(
    () => 'answered',
    (error: { code?: string }) => error.code,
  )

describe('the compute pool', () => {
  it('turns away what finds the queue full, and answers all that it took in', async () => {
    pool = createComputePool({ threads: 1, queue: 2, timeoutMs: 20_000 })
    const codes = await Promise.all(Array.from({ length: 5 }, () => codeOf(pool!.run(analysis(10)))))
    expect(codes).toEqual(['answered', 'answered', 'answered', 'busy', 'busy'])
    expect(await codeOf(pool.run(analysis(10)))).toBe('answered')
  })

  it('stops what takes too long, and computes again afterwards', async () => {
    pool = createComputePool({ threads: 1, queue: 2, timeoutMs: 10 })
    // A thread that has yet to start and load the engine cannot answer in 10 ms.
    expect(await codeOf(pool.run(analysis(2_000)))).toBe('computation-stopped')
    expect(pool.isAlive()).toBe(true)
  })

  it('drops what still waits when nobody wants it any more, so that the queue has room', async () => {
    pool = createComputePool({ threads: 1, queue: 1, timeoutMs: 20_000 })
    const first = pool.run(analysis(10))
    const gone = new AbortController()
    const abandoned = codeOf(pool.run(analysis(10), gone.signal))
    expect(await codeOf(pool.run(analysis(10)))).toBe('busy')
    gone.abort()
    expect(await abandoned).toBe('computation-stopped')
    expect(await codeOf(pool.run(analysis(10)))).toBe('answered')
    await first
  })

  it('says of a refusal what the engine said, field by field', async () => {
    pool = createComputePool({ threads: 1, queue: 1, timeoutMs: 20_000 })
    const output = { voltage: 24, currentMinimum: 0.5, currentMaximum: 8 }
    const design = DesignDocument.parse(buckDesign({ output }))
    await expect(pool.run({ task: 'analysis', input: { design } })).rejects.toMatchObject({
      code: 'design-refused',
      errors: [{ field: 'design.output.voltage' }],
    })
  })

  it('tells those who still wait that the server is being stopped', async () => {
    pool = createComputePool({ threads: 1, queue: 2, timeoutMs: 20_000 })
    const codes = Promise.all([codeOf(pool.run(analysis(10))), codeOf(pool.run(analysis(10)))])
    await pool.close()
    expect(await codes).toEqual(['not-ready', 'not-ready'])
    expect(pool.isAlive()).toBe(false)
  })

  it('has the engine loaded once it is warm', async () => {
    pool = createComputePool({ threads: 2, queue: 2, timeoutMs: 20_000 })
    await pool.warmUp()
    expect(pool.isAlive()).toBe(true)
    expect(JSON.parse(new TextDecoder().decode(await pool.run(warmUpRequest)))).toHaveProperty('operatingPoint')
  })
})

describe('over HTTP', () => {
  it('a full queue is a 503 that says when to try again, and the server goes on', async () => {
    const server = await startTestServer({ compute: { threads: 1, queue: 0 } })
    try {
      const ask = () => server.post('/analyses', { design: buckDesign(), frequencies: [1e3] })
      const responses = await Promise.all([ask(), ask(), ask()])
      const turnedAway = responses.filter(({ status }) => status !== 200)
      expect(turnedAway).toHaveLength(2)
      for (const response of turnedAway) {
        expect(response.headers.get('retry-after')).toBe('2')
        expect((await readProblem(response, 503)).type).toBe('/problems/busy')
      }
      expect((await ask()).status).toBe(200)
    } finally {
      await server.stop()
    }
  })

  it('a computation that takes too long is a 503 that says it was stopped', async () => {
    const server = await startTestServer({ compute: { threads: 1, queue: 5, timeoutMs: 10 } })
    try {
      const problem = await readProblem(await server.post('/analyses', { design: buckDesign() }), 503)
      expect(problem).toMatchObject({ type: '/problems/computation-stopped' })
      expect(problem.title).toBe('The computation took too long and was stopped.')
      expect((await fetch(`${server.origin}/healthz`)).status).toBe(200)
    } finally {
      await server.stop()
    }
  })
})

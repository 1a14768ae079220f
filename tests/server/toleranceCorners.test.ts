import { afterAll, beforeAll, describe, expect, it } from 'vitest'

import { ToleranceCornerSet } from '@/server/contract/toleranceCorners'
import { boostDesign, buckDesign } from '@/tests/support/designs'
import { fieldsOf, readProblem } from '@/tests/support/problems'
import { startTestServer, type TestServer } from '@/tests/support/server'

let server: TestServer
beforeAll(async () => {
  server = await startTestServer()
})
afterAll(() => server.stop())

describe('corners over the tolerances', () => {
  it.each([
    ['buck', buckDesign()],
    ['boost', boostDesign()],
  ])('of the %s come nominal first, with the worst named', async (_what, design) => {
    const response = await server.post('/tolerance-corners', { design, options: { mostCorners: 64 } })
    expect(response.status).toBe(200)
    const { corners, worst, quantities, model } = ToleranceCornerSet.parse(await response.json())
    expect(model).toBe('switched')
    expect(corners.length).toBeGreaterThan(4)
    expect(corners.length).toBeLessThanOrEqual(65)
    expect(corners[0]!.values).toEqual(quantities.map(({ nominal }) => nominal))
    expect(worst!.slack).toBe(Math.min(...corners.map(({ slack }) => slack)))
  })

  it('are over what is asked for alone', async () => {
    const options = { vary: ['line', 'inductance'], model: 'averaged' }
    const set = ToleranceCornerSet.parse(
      await (await server.post('/tolerance-corners', { design: buckDesign(), options })).json(),
    )
    expect(set.model).toBe('averaged')
    expect(new Set(set.quantities.map(({ group }) => group))).toEqual(new Set(['line', 'inductance']))
  })

  it('need a network', async () => {
    const response = await server.post('/tolerance-corners', { design: buckDesign({ compensator: null }) })
    expect(fieldsOf(await readProblem(response, 422))).toEqual(['design.compensator'])
  })
})

import { afterAll, beforeAll, expect, it } from 'vitest'

import { RootLocus } from '@/server/contract/rootLoci'
import { Simulation } from '@/server/contract/simulations'
import { buckDesign } from '@/tests/support/designs'
import { fieldsOf, readProblem } from '@/tests/support/problems'
import { startTestServer, type TestServer } from '@/tests/support/server'

let server: TestServer
beforeAll(async () => {
  server = await startTestServer()
})
afterAll(() => server.stop())

it('the closed loop answers a load step cycle by cycle, the output dipping first', async () => {
  const options = { scenario: { kind: 'load-step' } }
  const response = await server.post('/simulations', { design: buckDesign(), options })
  expect(Simulation.parse(await response.json()).readings.peakDeviation).toBeLessThan(0)
})

it('bad options of a simulation are named by their path', async () => {
  const options = { cycles: 3, scenario: { kind: 'load-step', to: -1 } }
  const problem = await readProblem(await server.post('/simulations', { design: buckDesign(), options }), 400)
  expect(fieldsOf(problem)).toEqual(['options.cycles', 'options.scenario.to'])
})

it('the root locus marks the present gain', async () => {
  const locus = RootLocus.parse(await (await server.post('/root-loci', { design: buckDesign() })).json())
  expect(locus.gainsDb[locus.present]).toBe(0)
})

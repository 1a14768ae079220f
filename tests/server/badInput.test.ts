/** What people and programs send by mistake: a clear error at the field, and the server stays up. */
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'

import { buckDesign } from '@/tests/support/designs'
import { fieldsOf, readProblem } from '@/tests/support/problems'
import { startTestServer, type TestServer } from '@/tests/support/server'

let server: TestServer
beforeAll(async () => {
  server = await startTestServer()
})
afterAll(() => server.stop())
afterEach(async () => {
  expect((await fetch(`${server.origin}/readyz`)).status).toBe(200)
})

/** The request as text, with one number written as given: `1e400` and `NaN` cannot be written by JSON.stringify. */
function withOutputVoltage(text: string): string {
  const body = JSON.stringify({ design: buckDesign(), frequencies: [1e3] })
  return body.replace('"voltage":3.3', `"voltage":${text}`)
}

const COMPUTE_PATHS = ['/analyses', '/corners', '/compensators', '/tolerance-corners'] as const

describe.each(COMPUTE_PATHS)('POST %s', (path) => {
  it.each([
    ['nothing at all', '""'],
    ['text', '"3.3 V"'],
    ['a number in quotes', '"3.3"'],
    ['a decimal comma in quotes', '"3,3"'],
    ['a negative value', '-3.3'],
    ['zero', '0'],
    ['an absurd size', '3.3e30'],
    ['1e400, which no number can hold', '1e400'],
    ['null', 'null'],
    ['a list', '[3.3]'],
    ['an object', '{"value":3.3}'],
    ['true', 'true'],
  ])('names the field that holds %s', async (_what, text) => {
    const problem = await readProblem(await server.post(path, withOutputVoltage(text)), 400)
    expect(problem.type).toBe('/problems/invalid-request')
    expect(fieldsOf(problem)).toEqual(['design.output.voltage'])
    expect(problem.errors?.[0]?.message).toMatch(/^[A-Z].*\.$/)
  })

  it.each(['NaN', 'Infinity', '3,3', "'3.3'", '0x10', ''])('says where JSON ends that has %s in it', async (text) => {
    const problem = await readProblem(await server.post(path, withOutputVoltage(text)), 400)
    expect(problem.type).toBe('/problems/malformed-json')
    expect(problem.detail).toMatch(/^Line 1, column \d+: /)
  })

  it('names every bad field at once', async () => {
    const design = buckDesign({
      switchingFrequency: -1,
      inductor: { inductance: 0 },
      outputCapacitors: [
        { count: 1.5, capacitance: 47e-6 },
        { count: 1, capacitance: -1 },
      ],
    })
    const problem = await readProblem(await server.post(path, { design }), 400)
    expect(fieldsOf(problem)).toEqual([
      'design.inductor.inductance',
      'design.outputCapacitors.0.count',
      'design.outputCapacitors.1.capacitance',
      'design.switchingFrequency',
    ])
  })

  it('names missing sections', async () => {
    const { inductor: _, modulator: __, ...rest } = buckDesign()
    const problem = await readProblem(await server.post(path, { design: rest }), 400)
    expect(problem.errors).toEqual([
      { field: 'design.inductor', message: 'This is missing.' },
      { field: 'design.modulator', message: 'This is missing.' },
    ])
  })

  it('lists the topologies when one is unknown', async () => {
    const problem = await readProblem(await server.post(path, { design: { ...buckDesign(), topology: 'quasi' } }), 400)
    expect(fieldsOf(problem)).toEqual(['design.topology'])
    expect(problem.errors?.[0]?.message).toMatch(/^Must be one of buck, boost, /)
  })

  it('lists the kinds of modulator when one is unknown', async () => {
    const design = { ...buckDesign(), modulator: { kind: 'hysteretic' } }
    const problem = await readProblem(await server.post(path, { design }), 400)
    expect(problem.errors).toEqual([
      { field: 'design.modulator.kind', message: 'Must be one of voltage-mode, peak-current-mode.' },
    ])
  })

  it('refuses a buck whose output lies above its line, at the field', async () => {
    const output = { voltage: 24, currentMinimum: 0.5, currentMaximum: 8 }
    const problem = await readProblem(await server.post(path, { design: buckDesign({ output }) }), 422)
    expect(problem.type).toBe('/problems/design-refused')
    expect(fieldsOf(problem)).toEqual(['design.output.voltage'])
    expect(problem.detail).toBeTruthy()
  })

  it('names the part that a topology cannot do without', async () => {
    const design = buckDesign({ topology: 'cuk', couplingCapacitor: null })
    const problem = await readProblem(await server.post(path, { design }), 422)
    expect(problem.type).toBe('/problems/design-refused')
    expect(fieldsOf(problem)).toEqual(['design.couplingCapacitor.capacitance'])
  })

  it.each(['null', '17', '"design"', '[]', '{}'])('refuses a request that is only %s', async (text) => {
    const problem = await readProblem(await server.post(path, text), 400)
    expect(problem.type).toBe('/problems/invalid-request')
    expect(problem.errors).toHaveLength(1)
  })

  it('refuses an empty body', async () => {
    const response = await fetch(`${server.origin}/api/v1${path}`, { method: 'POST' })
    expect((await readProblem(response, 400)).type).toBe('/problems/invalid-request')
  })

  it('refuses 10 MB without reading them', async () => {
    const design = { ...buckDesign(), padding: 'x'.repeat(10 * 1024 * 1024) }
    const problem = await readProblem(await server.post(path, { design }), 413)
    expect(problem.detail).toBe('At most 256 kB can be sent at once.')
  })

  it('is not confused by names that mean something to the language', async () => {
    const body = JSON.stringify({ design: buckDesign() }).replace('{', '{"__proto__":{"polluted":1},"constructor":{},')
    expect((await server.post(path, body)).status).toBe(200)
    expect(({} as Record<string, unknown>).polluted).toBeUndefined()
  })
})

describe('frequencies', () => {
  const ask = (frequencies: unknown) => server.post('/analyses', { design: buckDesign(), frequencies })

  it('are refused when there are 100 000 of them', async () => {
    const problem = await readProblem(await ask(new Array(100_000).fill(1)), 400)
    expect(problem.errors).toEqual([{ field: 'frequencies', message: 'Give at most 2000 frequencies.' }])
  })

  it.each([
    ['zero', [1e3, 0], 'frequencies.1'],
    ['a negative one', [-5], 'frequencies.0'],
    ['text', [1e3, '2k'], 'frequencies.1'],
    ['one beyond ten times the switching frequency', [1e3, 5.1e6], 'frequencies.1'],
    ['an empty list', [], 'frequencies'],
    ['a single number', 1e3, 'frequencies'],
  ])('name the one at fault: %s', async (_what, frequencies, field) => {
    expect(fieldsOf(await readProblem(await ask(frequencies), 400))).toEqual([field])
  })
})

it('names the place in JSON of several lines', async () => {
  const problem = await readProblem(await server.post('/analyses', '{\n  "design": {\n    "topology": buck\n'), 400)
  expect(problem.detail).toMatch(/^Line 3, column 17: /)
})

it('names bad wizard options by their path', async () => {
  const options = { crossover: -1, resistorSeries: 'E13' }
  const problem = await readProblem(await server.post('/compensators', { design: buckDesign(), options }), 400)
  expect(fieldsOf(problem)).toEqual(['options.crossover', 'options.resistorSeries'])
})

it('names bad options of the corners over tolerances by their path', async () => {
  const options = { mostCorners: 1_000, vary: ['weather'], conditions: { ageing: { esrFactor: -1 } } }
  const problem = await readProblem(await server.post('/tolerance-corners', { design: buckDesign(), options }), 400)
  expect(fieldsOf(problem)).toEqual(['options.conditions.ageing.esrFactor', 'options.mostCorners', 'options.vary.0'])
})

it('names bad quick-start figures by their path', async () => {
  const requirements = { topology: 'buck', line: { minimum: 15, nominal: 12, maximum: 9 } }
  const problem = await readProblem(await server.post('/stage-proposals', { requirements }), 400)
  expect(fieldsOf(problem)).toEqual(
    expect.arrayContaining([
      'requirements.controlScheme',
      'requirements.line.maximum',
      'requirements.line.minimum',
      'requirements.output',
      'requirements.switchingFrequency',
    ]),
  )
})

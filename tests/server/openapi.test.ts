import { Validator } from '@seriousme/openapi-schema-validator'
import Ajv from 'ajv/dist/2020.js'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { z } from 'zod'

import { ENDPOINTS } from '@/server/contract/endpoints'
import { SpreadRun } from '@/server/contract/spreadRuns'
import { buckDesign } from '@/tests/support/designs'
import { endOfRun } from '@/tests/support/spreadRuns'
import { startTestServer, type TestServer } from '@/tests/support/server'

const OpenApi = z.looseObject({
  openapi: z.literal('3.1.0'),
  paths: z.record(z.string(), z.record(z.string(), z.looseObject({ operationId: z.string() }))),
  components: z.object({ schemas: z.record(z.string(), z.looseObject({})) }),
})

let server: TestServer
let document: z.infer<typeof OpenApi>
beforeAll(async () => {
  server = await startTestServer()
  document = OpenApi.parse(await (await fetch(`${server.origin}/api/v1/openapi.json`)).json())
})
afterAll(() => server.stop())

/** A validator of one of the document's schemas, references followed. */
function validatorOf(name: string) {
  // Texts of these formats are held by the schema's own patterns too.
  const formats = { 'date-time': true, uuid: true } as const
  const ajv = new Ajv({ strict: false, allErrors: true, formats })
  return ajv.compile({ $ref: `#/components/schemas/${name}`, components: document.components })
}

describe('the OpenAPI document', () => {
  it('is sound by the schema of OpenAPI 3.1', async () => {
    const result = await new Validator().validate(structuredClone(document))
    expect(result.errors ?? []).toEqual([])
    expect(result.valid).toBe(true)
  })

  it('covers every endpoint, and every endpoint answers at its address', async () => {
    const described = Object.entries(document.paths).flatMap(([path, methods]) =>
      Object.keys(methods).map((method) => `${method} ${path}`),
    )
    expect(described.sort()).toEqual(ENDPOINTS.map(({ method, path }) => `${method} ${path}`).sort())
    for (const { method, path } of ENDPOINTS) {
      const url = `${server.origin}/api/v1${path.replace('{slug}', 'sensor-boost').replace('{id}', crypto.randomUUID())}`
      const response = await fetch(url, { method: method.toUpperCase() })
      // A run that nobody started is not there, but its address is.
      if (response.status === 404) expect(await response.text()).not.toMatch(/Nothing answers/)
      else expect([200, 400]).toContain(response.status)
    }
  })

  it('describes what is really answered', async () => {
    const design = buckDesign()
    const started = await server.post('/spread-runs', { design, options: { samples: 100 } })
    const { id } = SpreadRun.parse(await started.json())
    const run = await endOfRun(server, id)
    expect(run.result).not.toBeNull()
    const answers: Record<string, unknown> = {
      Analysis: await (await server.post('/analyses', { design: buckDesign() })).json(),
      SampleList: await (await fetch(`${server.origin}/api/v1/samples`)).json(),
      Sample: await (await fetch(`${server.origin}/api/v1/samples/sensor-boost`)).json(),
      ToleranceCornerSet: await (await server.post('/tolerance-corners', { design })).json(),
      SpreadRun: run,
      Problem: await (await server.post('/analyses', {})).json(),
    }
    for (const [name, answer] of Object.entries(answers)) {
      const validate = validatorOf(name)
      validate(answer)
      expect(validate.errors ?? []).toEqual([])
    }
  })

  it('lets a client see from the request schema that a value is out of range', () => {
    const validate = validatorOf('AnalysisRequest')
    expect(validate({ design: buckDesign() })).toBe(true)
    expect(validate({ design: buckDesign({ switchingFrequency: -1 }) })).toBe(false)
  })
})

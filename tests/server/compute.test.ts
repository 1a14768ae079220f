import { afterAll, beforeAll, describe, expect, it } from 'vitest'

import { DesignDocument } from '@/converters/document'
import { Analysis } from '@/server/contract/analyses'
import { CompensatorProposals } from '@/server/contract/compensators'
import { CornerSet } from '@/server/contract/corners'
import { Sample, SampleList } from '@/server/contract/samples'
import { StageProposal } from '@/server/contract/stageProposals'
import { buckDesign } from '@/tests/support/designs'
import { startTestServer, type TestServer } from '@/tests/support/server'

let server: TestServer
beforeAll(async () => {
  server = await startTestServer()
})
afterAll(() => server.stop())

describe('an analysis', () => {
  it('answers the operating point, the plant and both models at the frequencies asked for', async () => {
    const frequencies = [100, 1e3, 10e3, 100e3]
    const design = buckDesign({ compensator: null })
    const response = await server.post('/analyses', { design, frequencies })
    expect(response.status).toBe(200)
    expect(response.headers.get('content-type')).toMatch(/^application\/json/)
    expect(response.headers.get('cache-control')).toBe('no-store')
    const analysis = Analysis.parse(await response.json())
    // An ideal buck has D = V/Vg; the resistances of this one ask for a little more.
    expect(analysis.operatingPoint.dutyCycle).toBeGreaterThan(3.3 / 12)
    expect(analysis.operatingPoint.dutyCycle).toBeLessThan(0.3)
    expect(analysis.operatingPoint).toMatchObject({ lineVoltage: 12, outputCurrent: 8, conduction: 'continuous' })
    expect(analysis.frequencies).toEqual(frequencies)
    for (const pair of Object.values(analysis.responses)) {
      expect(pair.averaged).toHaveLength(4)
      expect(pair.switched).toHaveLength(4)
    }
    expect(analysis).toMatchObject({ loop: null, margins: null, steps: null, innerCurrentLoop: null })
  })

  it('has a loop with margins once the design has a network', async () => {
    const analysis = Analysis.parse(await (await server.post('/analyses', { design: buckDesign() })).json())
    expect(analysis.loop?.response.switched).toHaveLength(analysis.frequencies.length)
    expect(analysis.margins?.crossover).toBeGreaterThan(0)
  })

  it('is made at the operating point asked for', async () => {
    const operatingPoint = { lineVoltage: 9, outputCurrent: 1 }
    const response = await server.post('/analyses', { design: buckDesign(), operatingPoint, frequencies: [1e3] })
    expect(Analysis.parse(await response.json()).operatingPoint).toMatchObject(operatingPoint)
  })

  it('is the same every time it is asked for', async () => {
    const ask = async () => (await server.post('/analyses', { design: buckDesign() })).text()
    expect(await ask()).toBe(await ask())
  })

  it('answers many at once', async () => {
    const responses = await Promise.all(
      Array.from({ length: 20 }, () => server.post('/analyses', { design: buckDesign(), frequencies: [1e3] })),
    )
    expect(responses.map(({ status }) => status)).toEqual(new Array(20).fill(200))
  })
})

describe('the corners', () => {
  it('span line and load, with the loop at each', async () => {
    const frequencies = [1e3, 10e3]
    const response = await server.post('/corners', { design: buckDesign(), frequencies })
    expect(response.status).toBe(200)
    const { corners, worst } = CornerSet.parse(await response.json())
    const lines = corners.map(({ lineVoltage }) => lineVoltage)
    expect(Math.min(...lines)).toBe(9)
    expect(Math.max(...lines)).toBe(15)
    for (const corner of corners) expect(corner.loop).toHaveLength(2)
    const margins = corners.map((corner) => corner.margins.phaseMargin ?? Infinity)
    expect(margins[worst]).toBe(Math.min(...margins))
  })
})

describe('the compensator wizard', () => {
  it('answers a type III network in preferred values for the lightly damped buck', async () => {
    const response = await server.post('/compensators', { design: buckDesign(), options: { crossover: 50e3 } })
    expect(response.status).toBe(200)
    const { proposals, refusal } = CompensatorProposals.parse(await response.json())
    expect(refusal).toBeNull()
    expect(proposals[0]?.type).toBe('III')
    expect(Object.keys(proposals[0]?.parts.preferred ?? {}).sort()).toEqual(['C1', 'C2', 'C3', 'R1', 'R2', 'R3'])
  })

  it('takes its options as left to itself when none are given', async () => {
    const response = await server.post('/compensators', { design: buckDesign() })
    expect(CompensatorProposals.parse(await response.json()).suggestion?.crossover).toBeGreaterThan(0)
  })
})

describe('the quick start', () => {
  it('answers a whole design that can be analysed, with reasons', async () => {
    const requirements = {
      topology: 'boost',
      controlScheme: 'peak-current-mode',
      line: { minimum: 4.5, nominal: 5, maximum: 5.5 },
      output: { voltage: 24, currentMinimum: 0.05, currentMaximum: 0.6 },
      switchingFrequency: 350e3,
    }
    const response = await server.post('/stage-proposals', { requirements })
    expect(response.status).toBe(200)
    const { design, choices } = StageProposal.parse(await response.json())
    expect(design).toEqual(DesignDocument.parse(design))
    expect(design).toMatchObject({ topology: 'boost', modulator: { kind: 'peak-current-mode' } })
    expect(choices.map(({ field }) => field)).toContain('inductor.inductance')
    expect((await server.post('/analyses', { design, frequencies: [1e3] })).status).toBe(200)
  })
})

describe('the samples', () => {
  it('can each be opened and computed, and say that they are invented', async () => {
    const { samples } = SampleList.parse(await (await fetch(`${server.origin}/api/v1/samples`)).json())
    const kinds = samples.map(({ topology, control }) => `${topology} ${control}`)
    expect(new Set(kinds)).toEqual(
      new Set([
        'buck voltage-mode',
        'buck peak-current-mode',
        'boost voltage-mode',
        'boost peak-current-mode',
        'flyback peak-current-mode',
        'sepic peak-current-mode',
      ]),
    )
    for (const { slug, summary } of samples) {
      expect(summary).toContain('Invented')
      const sample = Sample.parse(await (await fetch(`${server.origin}/api/v1/samples/${slug}`)).json())
      expect(sample).toMatchObject({ slug, summary })
      const response = await server.post('/analyses', { design: sample.design, frequencies: [1e3] })
      expect(response.status).toBe(200)
    }
  })

  it('hold a boost that stays in discontinuous conduction over line and load', async () => {
    const { design } = Sample.parse(await (await fetch(`${server.origin}/api/v1/samples/echo-sounder-bias`)).json())
    for (const lineVoltage of [design.line.minimum, design.line.maximum]) {
      for (const outputCurrent of [design.output.currentMinimum, design.output.currentMaximum]) {
        const operatingPoint = { lineVoltage, outputCurrent }
        const response = await server.post('/analyses', { design, operatingPoint, frequencies: [1e3] })
        expect(Analysis.parse(await response.json()).operatingPoint.conduction).toBe('discontinuous')
      }
    }
  })

  it.each(['no-such-rail', 'Not%20A%20Slug', "x'; drop table sample_designs; --"])(
    'has none called %s',
    async (slug) => {
      const response = await fetch(`${server.origin}/api/v1/samples/${slug}`)
      expect(response.status).toBe(404)
      expect(await response.json()).toMatchObject({ type: '/problems/not-found' })
    },
  )
})

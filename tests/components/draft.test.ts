import * as fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { DesignDocument } from '@/converters/document'
import { formatEntry, settle, shownEntry } from '@/hooks/draft/entries'
import { readDraft } from '@/hooks/draft/schema'
import { draftStore } from '@/hooks/draft/store'
import { parseQuantity } from '@/converters/quantities'

const design = DesignDocument.parse({
  topology: 'buck',
  switchingFrequency: 500e3,
  line: { minimum: 9, nominal: 12, maximum: 15 },
  output: { voltage: 3.3, currentMinimum: 0.5, currentMaximum: 8 },
  inductor: { inductance: 2.2e-6, resistance: 8e-3 },
  outputCapacitors: [{ count: 4, capacitance: 47e-6, esr: 3e-3 }],
  rectifier: { kind: 'synchronous', onResistance: 8e-3 },
  modulator: { kind: 'voltage-mode', rampAmplitude: 1.5 },
})

describe('typing into a design', () => {
  it('takes a sound entry over at once', () => {
    const settled = settle(design, { 'inductor.inductance': '4u7' })
    expect(settled.design.inductor.inductance).toBe(4.7e-6)
    expect(settled.texts).toEqual({})
  })
  it('keeps what cannot be read, with the reason, and the value before', () => {
    const settled = settle(design, { 'inductor.inductance': 'plenty' })
    expect(settled.design).toBe(design)
    expect(settled.texts).toEqual({ 'inductor.inductance': 'plenty' })
    expect(settled.problems['inductor.inductance']).toContain('not a number')
    expect(shownEntry(settled.design, settled.texts, 'inductor.inductance')).toBe('plenty')
  })
  it('keeps what is out of range, with the document’s own sentence', () => {
    expect(settle(design, { 'inductor.inductance': '0' }).problems['inductor.inductance']).toMatch(/zero|at least/)
  })
  it('holds entries back that only make sense together, and takes them when they do', () => {
    const first = settle(design, { 'line.nominal': '24' })
    expect(first.design.line.nominal).toBe(12)
    const both = settle(first.design, { ...first.texts, 'line.maximum': '30' })
    expect(both.design.line).toEqual({ minimum: 9, nominal: 24, maximum: 30 })
    expect(both.texts).toEqual({})
  })
  it('takes a sound entry while another one waits', () => {
    const settled = settle(design, { 'inductor.inductance': 'plenty', 'output.voltage': '5' })
    expect(settled.design.output.voltage).toBe(5)
    expect(Object.keys(settled.texts)).toEqual(['inductor.inductance'])
  })
  it('reads an empty wish as none', () => {
    const asked = settle(design, { 'targets.crossover': '40k' }).design
    expect(asked.targets.crossover).toBe(40e3)
    expect(settle(asked, { 'targets.crossover': ' ' }).design.targets.crossover).toBeNull()
  })
  it('never loses what was typed, whatever it is', () => {
    const paths = ['inductor.inductance', 'line.nominal', 'outputCapacitors.0.esr', 'targets.crossover'] as const
    fc.assert(
      fc.property(fc.dictionary(fc.constantFrom(...paths), fc.string({ maxLength: 12 })), (texts) => {
        const settled = settle(design, texts)
        expect(DesignDocument.safeParse(settled.design).success).toBe(true)
        for (const path of Object.keys(settled.texts)) expect(settled.texts[path]).toBe(texts[path])
      }),
    )
  })
})

describe('asking for another crossover', () => {
  const first = { type: 'III' as const, parts: { R1: 10e3, R2: 7.5e3, C1: 2.7e-9 } }
  const second = { type: 'III' as const, parts: { R1: 10e3, R2: 3.3e3, C1: 6.8e-9 } }
  const draft = () => {
    const stored = draftStore.read()
    if (stored.kind !== 'draft') throw new Error('no draft')
    return stored.draft
  }

  it('is one step back, together with the network that followed, however far the handle was drawn', () => {
    draftStore.open(design)
    draftStore.takeNetwork(first)
    for (const wish of [50e3, 45e3, 40e3]) draftStore.wantCrossover(wish)
    expect(draft()).toMatchObject({ awaitsProposal: true, design: { targets: { crossover: 40e3 } } })
    draftStore.takeNetwork(second)
    draftStore.undo()
    expect(draft()).toMatchObject({
      awaitsProposal: false,
      design: { targets: { crossover: null }, compensator: first },
    })
  })
  it('leaves a network alone whose parts were set by hand', () => {
    draftStore.open(design)
    draftStore.takeNetwork(first)
    draftStore.type('compensator.parts.R2', '8k2')
    draftStore.wantCrossover(40e3)
    expect(draft().awaitsProposal).toBe(false)
    expect(draft().design.compensator?.parts.R2).toBe(8.2e3)
  })
})

describe('what a field shows', () => {
  it('is the shortest text for the value', () => {
    expect([
      formatEntry(4.7e-6, 'H'),
      formatEntry(12, 'V'),
      formatEntry(0.98, '%'),
      formatEntry(4.7123e-6, 'H'),
    ]).toEqual(['4.7 µH', '12 V', '98 %', '4.7123 µH'])
  })
  it('reads back as the same value', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 99_999_999 }), fc.integer({ min: -14, max: 4 }), (digits, exponent) => {
        const value = Number(`${digits}e${exponent}`)
        const back = parseQuantity(formatEntry(value, 'F'), 'F')
        expect(back.kind === 'value' && Math.abs(back.value / value - 1) < 1e-8).toBe(true)
      }),
    )
  })
})

describe('a stored draft', () => {
  it('fills in what an older one lacks', () => {
    const read = readDraft(JSON.stringify({ design }))
    expect(read).toMatchObject({ kind: 'draft', draft: { point: { line: 'nominal', load: 'maximum' }, texts: {} } })
  })
  it.each(['{"version":', '{}', 'null', '{"version":99,"design":{}}'])('hands %s back unread', (text) => {
    expect(readDraft(text)).toEqual({ kind: 'unreadable', text })
  })
})

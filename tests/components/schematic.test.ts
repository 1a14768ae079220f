import { beforeEach, describe, expect, it } from 'vitest'
import { hitBoxes } from '@/components/schematic/hitBoxes'
import { stageLayout } from '@/components/schematic/stageLayout'
import { startingDesign } from '@/components/start/startingDesigns'
import { usualModulator } from '@/components/stage/usualModulator'
import { analyse } from '@/converters'
import { DesignDocument, TOPOLOGIES, type Topology } from '@/converters/document'
import { fitInputFilter, setModulator, setTopology } from '@/hooks/draft/edits'
import { draftStore } from '@/hooks/draft/store'

const begin = DesignDocument.parse(startingDesign('buck-boost', 'voltage-mode'))

function open(): DesignDocument {
  const stored = draftStore.read()
  if (stored.kind !== 'draft') throw new Error('No design is open.')
  return stored.draft.design
}

/** Lines and outputs that each circuit can serve. */
const REACH: Readonly<Partial<Record<Topology, number>>> = { buck: 5, boost: 48 }

describe.each(TOPOLOGIES)('another topology: %s', (topology) => {
  beforeEach(() => {
    draftStore.open({ ...begin, output: { ...begin.output, voltage: REACH[topology] ?? 12 } })
    setTopology(topology)
  })
  it('computes with what was filled in, and the way back finds the parts as they were', () => {
    expect(analyse(open()).operatingPoint.dutyCycle).toBeGreaterThan(0.1)
    expect(open().line).toEqual(begin.line)
    setTopology('buck-boost')
    expect(open()).toMatchObject({ inductor: begin.inductor, outputCapacitors: begin.outputCapacitors })
  })
  it('takes peak current mode without an oscillation of the current loop', () => {
    setModulator(usualModulator(open(), analyse(open()).operatingPoint, 'peak-current-mode'))
    expect(analyse(open()).warnings.map(({ code }) => code)).not.toContain('subharmonic-oscillation')
  })
  it.each([326, 340, 520])(
    'is drawn inside its frame of %s px, filter or not, each part to be pressed once',
    (width) => {
      for (const isFiltered of [false, true]) {
        fitInputFilter(isFiltered)
        const layout = stageLayout(width, open())
        const boxes = hitBoxes(open(), layout)
        expect(new Set(boxes.map(({ label }) => label)).size).toBe(boxes.length)
        for (const box of boxes) {
          expect(box.x).toBeGreaterThanOrEqual(0)
          expect(box.x + box.width).toBeLessThanOrEqual(layout.width)
        }
        const { gate, control } = layout
        expect(gate.x).toBeGreaterThan(control.left)
        expect(gate.x).toBeLessThan(control.middle - 14)
      }
    },
  )
})

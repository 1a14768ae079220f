import * as fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { overlaps, placeLabels, spread, type Box } from '@/components/plots/layout'

describe('marks along a line', () => {
  const positions = fc.array(fc.double({ min: 0, max: 400, noNaN: true }), { maxLength: 14 })

  it('end up at least the gap apart and keep their order', () => {
    fc.assert(
      fc.property(positions, (list) => {
        const placed = spread(list, 10)
        const pairs = list.map((at, index) => ({ at, placed: placed[index]! })).sort((a, b) => a.placed - b.placed)
        for (let index = 1; index < pairs.length; index += 1) {
          expect(pairs[index]!.placed - pairs[index - 1]!.placed).toBeGreaterThanOrEqual(10 - 1e-6)
          expect(pairs[index]!.at).toBeGreaterThanOrEqual(pairs[index - 1]!.at)
        }
      }),
    )
  })
  it('stay where they are when they are far apart', () => {
    expect(spread([10, 50, 90], 10)).toEqual([10, 50, 90])
  })
  it('stand about the middle of a pair that coincides', () => {
    expect(spread([100, 100], 10)).toEqual([95, 105])
  })
})

describe('labels', () => {
  const frame: Box = { x: 0, y: 0, width: 358, height: 240 }
  const points = fc.array(
    fc.record({
      x: fc.double({ min: 10, max: 348, noNaN: true }),
      y: fc.double({ min: 10, max: 230, noNaN: true }),
      width: fc.double({ min: 20, max: 110, noNaN: true }),
      height: fc.constant(17),
    }),
    { maxLength: 10 },
  )

  it('never cover one another or a mark, and never leave the frame', () => {
    fc.assert(
      fc.property(points, (requests) => {
        const marks = requests.map(({ x, y }) => ({ x: x - 6, y: y - 6, width: 12, height: 12 }))
        const placed = placeLabels(requests, frame, marks).filter((box) => box !== null)
        placed.forEach((box, index) => {
          expect(box.x).toBeGreaterThanOrEqual(0)
          expect(box.x + box.width).toBeLessThanOrEqual(frame.width)
          for (const other of [...placed.slice(index + 1), ...marks]) expect(overlaps(box, other)).toBe(false)
        })
      }),
    )
  })
  it('finds room for a lone label in a corner', () => {
    expect(placeLabels([{ x: 352, y: 6, width: 80, height: 17 }], frame, [])[0]).not.toBeNull()
  })
})

import { expect, it } from 'vitest'
import { analyse, analyseRootLocus } from '@/converters'
import { buckDesign } from '@/tests/support/designs'
import { expectRelative } from '@/tests/support/expectRelative'

it('passes through the closed-loop poles at the present gain, and ends on poles and zeros of the open loop', () => {
  const locus = analyseRootLocus(buckDesign())
  const { loop, plant } = analyse(buckDesign())
  const present = locus.branches.map((branch) => branch[locus.present]!)
  for (const pole of loop!.closedLoopPoles) {
    const nearest = Math.min(...present.map((p) => Math.hypot(p.real - pole.real, p.imaginary - pole.imaginary)))
    expect(nearest).toBeLessThan(1e-6 * Math.hypot(pole.real, pole.imaginary))
  }
  // Evans: with the gain gone the branches start at the open-loop poles, which are the plant's and the network's.
  const size = (p: { real: number; imaginary: number }) => Math.hypot(p.real, p.imaginary)
  const start = locus.branches.map((branch) => size(branch[0]!)).sort((a, b) => a - b)
  const open = [...plant.poles, ...loop!.compensatorPoles].map(size).sort((a, b) => a - b)
  open.slice(1).forEach((value, i) => expectRelative(start[i + 1]!, value, 0.35))
  expect(start).toHaveLength(open.length)
})

it('leaves the left half plane where the averaged loop loses its gain margin', () => {
  const design = buckDesign({ amplifier: { kind: 'op-amp', gainBandwidth: 3e6, openLoopGain: 1e4 } })
  const { averagedMargins } = analyse(design)
  const { stableRange } = analyseRootLocus(design)
  expect(averagedMargins!.gainMargin).not.toBeNull()
  expect(Math.abs(stableRange!.highestDb! - averagedMargins!.gainMargin!)).toBeLessThan(1.01)
  expect(stableRange!.lowestDb).toBeNull()
})

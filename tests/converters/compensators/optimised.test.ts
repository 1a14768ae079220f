import { describe, expect, it } from 'vitest'
import { proposeCompensator } from '@/converters'
import { minimise } from '@/converters/numeric/nelderMead'
import type { DesignDocumentInput } from '@/converters/document'
import { SAMPLES } from '@/db/seed/samples'
import { boostDesign, buckDesign } from '@/tests/support/designs'

it("finds the minimum of Rosenbrock's valley at (1, 1)", () => {
  // Rosenbrock, The Computer Journal 1960; the usual start.
  const { x } = minimise(([a, b]) => 100 * (b! - a! * a!) ** 2 + (1 - a!) ** 2, [-1.2, 1], 0.5, 600)
  expect(Math.abs(x[0]! - 1)).toBeLessThan(1e-3)
  expect(Math.abs(x[1]! - 1)).toBeLessThan(1e-3)
})

describe('the optimised network', () => {
  const designs: (readonly [string, DesignDocumentInput])[] = [
    ['buck', buckDesign({ compensator: null })],
    ['boost', boostDesign({ compensator: null })],
    ...SAMPLES.map(({ slug, design }) => [slug, { ...design, compensator: null }] as const),
  ]
  it.each(designs)(
    'beats the worst corner of the K-factor network at the same crossover, or says why not: %s',
    (_name, design) => {
      const { proposals } = proposeCompensator(design)
      const of = (method: string) => proposals.find((proposal) => proposal.method === method)!
      const [optimised, byFactor] = [of('optimised'), of('k-factor')]
      expect(optimised.crossover).toBe(byFactor.crossover)
      const gain = optimised.margins.ideal.worst.phaseMargin! - byFactor.margins.ideal.worst.phaseMargin!
      if (gain < 0.5) expect(optimised.reasons.join(' ')).toMatch(/K-factor network stands already/)
      // Candidates are told apart by interpolated margins, good to hundredths of a degree.
      expect(gain).toBeGreaterThan(-0.05)
      expect(optimised.margins.preferred.worst.isStable).toBe(true)
      // The gain margin that was aimed for is kept.
      expect(optimised.margins.ideal.worst.gainMargin ?? Infinity).toBeGreaterThan(9.9)
    },
  )

  it('comes with its load-step dip and a reason that names the method', () => {
    const { proposals } = proposeCompensator(buckDesign({ compensator: null }))
    const optimised = proposals.find(({ method }) => method === 'optimised')!
    expect(optimised.reasons.join(' ')).toMatch(/Nelder and Mead/)
    expect(optimised.loadStepDip).toBeLessThan(0)
  })

  it('asked for the highest crossover, goes beyond the other methods and still holds at every corner', () => {
    // A right-half-plane zero far up leaves the phase, not the window, to bound the crossover.
    const design = buckDesign({
      compensator: null,
      amplifier: { kind: 'op-amp', gainBandwidth: 60e6, openLoopGain: 1e4 },
    })
    const usual = proposeCompensator(design)
    const fast = proposeCompensator(design, { aim: 'crossover' })
    expect(fast.suggestion!.crossover).toBeGreaterThanOrEqual(usual.suggestion!.crossover)
    const [best] = fast.proposals
    expect(best!.margins.ideal.worst.phaseMargin!).toBeGreaterThan(55)
    expect(best!.margins.ideal.worst.isStable).toBe(true)
    const asked = proposeCompensator(design, { aim: 'crossover', crossover: 30e3 })
    expect(asked.suggestion!.crossover).toBe(30e3)
  })
})

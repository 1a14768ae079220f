/** The statistical run: what it promises about seeds, blocks, workers, yield and ranking. */
import { describe, expect, it } from 'vitest'
import { analyse, DesignError } from '@/converters'
import {
  mergeSummaries,
  presentSummary,
  runSpread,
  startRun,
  type SpreadResult,
  type SpreadSummary,
} from '@/converters/spread'
import { buckDesign } from '@/tests/support/designs'

import { expectRelative } from '@/tests/support/expectRelative'
import { SPREAD_DESIGNS } from './designs'
import { expectNumbers } from './expectNumbers'

const design = buckDesign()

describe('a run', () => {
  it('gives the same answer for the same seed, another for another', () => {
    const options = { samples: 200, seed: 9 }
    expect(runSpread(design, options)).toEqual(runSpread(design, options))
    expect(runSpread(design, options).distributions.phaseMargin!.mean).not.toBe(
      runSpread(design, { samples: 200, seed: 10 }).distributions.phaseMargin!.mean,
    )
  })

  it('done in blocks equals the whole run, and says how far it is', () => {
    const options = { samples: 300, sobolSamples: 10 }
    const run = startRun(design, options)
    const seen: number[] = []
    while (run.next(37)) seen.push(run.progress.done)
    expect(seen[0]).toBe(37)
    expect(seen).toEqual([...seen].sort((a, b) => a - b))
    expect(run.progress.done).toBe(run.progress.total)
    expect(run.snapshot()).toEqual(runSpread(design, options))
  })

  it('shows a part of itself while it goes on, and nothing that is not a number before it starts', () => {
    const run = startRun(design, { samples: 500 })
    expectNumbers(run.snapshot())
    expect(run.snapshot().yields.all).toMatchObject({ lower: 0, upper: 1 })
    run.next(120)
    expect(run.snapshot().samples).toBe(120)
    expectNumbers(run.snapshot())
  })

  it('shared among three workers equals the whole run', () => {
    const options = { samples: 301, sobolSamples: 20 }
    const parts = [2, 0, 1].map((index) => {
      const run = startRun(design, options, { index, of: 3 })
      run.next(Infinity)
      return structuredClone(run.summary())
    }) as [SpreadSummary, ...SpreadSummary[]]
    const merged = presentSummary(mergeSummaries(parts))
    const whole = runSpread(design, options)
    const rankings = ({ regression, sobol, ...rest }: SpreadResult) => ({ rest, regression, sobol })
    expect(rankings(merged).rest).toEqual(rankings(whole).rest)
    // Sums in another order differ by round-off.
    whole.regression.forEach(({ coefficients, determination }, k) => {
      expectRelative(merged.regression[k]!.determination, determination, 1e-9)
      coefficients.forEach(({ key, value }, i) => {
        expect(merged.regression[k]!.coefficients[i]!.key).toBe(key)
        expect(Math.abs(merged.regression[k]!.coefficients[i]!.value - value)).toBeLessThan(1e-9)
      })
    })
    whole.sobol.forEach(({ indices }, k) =>
      indices.forEach(({ firstOrder }, i) =>
        expect(Math.abs(merged.sobol[k]!.indices[i]!.firstOrder - firstOrder)).toBeLessThan(1e-9),
      ),
    )
  })

  it.each(Object.keys(SPREAD_DESIGNS))('of a %s holds nothing that is not a number', (name) => {
    const result = runSpread(SPREAD_DESIGNS[name], { samples: 150, sobolSamples: 5 })
    expectNumbers(result)
    expect(result.distributions.crossover!.count).toBeGreaterThan(100)
    expect(result.bands!.samples).toBeGreaterThan(100)
    expect(result.closedLoopPoles).toHaveLength(result.bands!.samples)
  })

  it('counts every sample once in the histograms', () => {
    const { distributions } = runSpread(SPREAD_DESIGNS['buck, peak current mode'], { samples: 400 })
    for (const figure of ['crossover', 'phaseMargin', 'gainMargin', 'modulusMargin'] as const) {
      const { histogram, count, absent, minimum, maximum } = distributions[figure]!
      expect(histogram.counts.reduce((sum, value) => sum + value, 0)).toBe(count)
      expect(count + absent).toBe(400)
      expect(histogram.edges[0]!).toBeLessThanOrEqual(minimum)
      expect(histogram.edges.at(-1)!).toBeGreaterThanOrEqual(maximum)
    }
  })

  it('finds poles in the left half plane exactly where it finds the loop stable', () => {
    const result = runSpread(SPREAD_DESIGNS['buck, peak current mode'], { samples: 200 })
    expect(result.yields.stable.passed).toBe(200)
    for (const poles of result.closedLoopPoles) for (const { real } of poles) expect(real).toBeLessThan(0)
  })
})

describe('worst sample and yield', () => {
  it('names part values with which the analysis finds the same margins', () => {
    const { worst, quantities } = runSpread(design, {
      samples: 300,
      model: 'switched',
      vary: ['line', 'load', 'inductance', 'esr'],
    })
    const value = (key: string) => worst!.values[quantities.findIndex((quantity) => quantity.key === key)]!
    const { margins } = analyse(
      {
        ...design,
        inductor: { ...design.inductor, inductance: value('inductor.inductance') },
        outputCapacitors: [{ ...design.outputCapacitors[0]!, esr: value('outputCapacitors[0].esr') }],
      },
      { operatingPoint: { lineVoltage: value('line'), outputCurrent: value('load') } },
    )
    expectRelative(worst!.margins.crossover!, margins!.crossover!, 1e-3)
    expect(Math.abs(worst!.margins.phaseMargin! - margins!.phaseMargin!)).toBeLessThan(0.05)
  })

  it('is all with targets of nothing and none with targets that no loop meets', () => {
    const none = { phaseMargin: 0, gainMargin: 0, modulusMargin: 0 }
    expect(runSpread(design, { samples: 100, targets: none }).yields.all.passed).toBe(100)
    const strict = runSpread(design, { samples: 100, targets: { ...none, phaseMargin: 120 } }).yields
    expect(strict.phaseMargin.passed).toBe(0)
    expect(strict.gainMargin.passed).toBe(100)
    expect(strict.all.passed).toBe(0)
  })

  it('counts samples that cannot be reached as failures, with the reason', () => {
    const low = buckDesign({ line: { minimum: 2.5, nominal: 12, maximum: 15 } })
    const { failures, yields, samples, distributions } = runSpread(low, { samples: 500 })
    expect(failures[0]).toMatchObject({ code: 'unreachable-output' })
    expect(failures[0]!.message).toMatch(/reaches at most/)
    expect(yields.reached.passed + failures[0]!.count).toBe(samples)
    expect(distributions.crossover!.count).toBe(yields.reached.passed)
    // A twelfth or so of the line range lies below what 3.3 V and the losses need: (3.4 … 3.6 − 2.5)/12.5.
    expect(failures[0]!.count / samples).toBeGreaterThan(0.06)
    expect(failures[0]!.count / samples).toBeLessThan(0.11)
  })
})

describe('what varies', () => {
  it('is only what is asked for', () => {
    const { quantities } = runSpread(design, { samples: 100, vary: ['inductance', 'resistor'] })
    expect(quantities.map(({ key }) => key)).toEqual([
      'inductor.inductance',
      'compensator.parts.R1',
      'sense.lowerResistance',
      'compensator.parts.R2',
      'compensator.parts.R3',
    ])
  })

  it('takes measured deviations as they are', () => {
    // Two inductors only: the crossover of each sample is one of two.
    const options = { samples: 100, vary: ['inductance' as const], measured: { inductance: [-0.1, 0.15] } }
    const { distributions } = runSpread(design, options)
    const alone = [0.9, 1.15].map(
      (factor) =>
        analyse({ ...design, inductor: { ...design.inductor, inductance: 2.2e-6 * factor } }).averagedMargins!
          .crossover!,
    )
    expectRelative(distributions.crossover!.maximum, Math.max(...alone), 1e-3)
    expectRelative(distributions.crossover!.minimum, Math.min(...alone), 1e-3)
    expectRelative(distributions.crossover!.mean, (alone[0]! + alone[1]!) / 2, 1e-3)
  })

  it('a wider distribution spreads margins wider', () => {
    const width = (distribution: 'normal' | 'uniform') =>
      runSpread(design, { samples: 1000, distribution, vary: ['capacitance'] }).distributions.crossover!
        .standardDeviation
    // σ of a uniform distribution is a/√3, of a normal one with 3σ at a and cut there 0.3289·a.
    expectRelative(width('uniform') / width('normal'), 1 / Math.sqrt(3) / 0.3289, 0.03)
  })

  it('shifts capacitors by temperature and age before it spreads them', () => {
    const shifted = runSpread(design, {
      samples: 100,
      vary: ['capacitance', 'esr'],
      conditions: { temperature: { esrFactor: 3 }, ageing: { capacitanceFactor: 0.8, esrFactor: 2 } },
    })
    expectRelative(shifted.quantities[0]!.nominal, 0.8 * 47e-6, 1e-12)
    expectRelative(shifted.quantities[1]!.nominal, 6 * 3e-3, 1e-12)
  })
})

describe('bad options are named at their field', () => {
  it.each([
    [{ samples: 1e6 }, 'samples'],
    [{ samples: 1000.5 }, 'samples'],
    [{ samples: NaN }, 'samples'],
    [{ seed: -1 }, 'seed'],
    [{ distribution: 'triangular' }, 'distribution'],
    [{ measured: { inductance: [0.1, -1] } }, 'measured.inductance[1]'],
    [{ vary: [] }, 'vary'],
    [{ vary: ['weather'] }, 'vary[0]'],
    [{ model: 'exact' }, 'model'],
    [{ conditions: { ageing: { esrFactor: 'worse' } } }, 'conditions.ageing.esrFactor'],
    [{ targets: { phaseMargin: Infinity } }, 'targets.phaseMargin'],
    [{ confidence: 1 }, 'confidence'],
  ])('%j', (options, field) => {
    expect(problemsOf(() => runSpread(design, options))).toContain(field)
  })

  it('and so is a missing network', () => {
    expect(problemsOf(() => runSpread(buckDesign({ compensator: null })))).toEqual(['compensator'])
  })
})

function problemsOf(work: () => unknown): string[] {
  try {
    work()
  } catch (error) {
    if (error instanceof DesignError) return error.problems.map(({ field }) => field)
    throw error
  }
  return []
}

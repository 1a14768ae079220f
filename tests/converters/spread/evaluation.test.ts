/** The quick route of the spread against the exact one: the same circuits, responses and margins. */
import { describe, expect, it } from 'vitest'
import { modelResponses } from '@/converters/averaged/linearModel'
import { analyse } from '@/converters'
import { buildCircuit } from '@/converters/circuit'
import { readMargins, type LoopGain } from '@/converters/loop/margins'
import { complex, modulus, subtract } from '@/converters/numeric/complex'
import { parseDesign } from '@/converters/parse'
import { openPlant } from '@/converters/plant'
import { marginsOf } from '@/converters/analysis'
import { averagedPoint } from '@/converters/spread/averagedPoint'
import { circuitFamily } from '@/converters/spread/circuitFamily'
import { evaluatorFor, requireNetwork, type Evaluation } from '@/converters/spread/evaluation'
import { runSpread } from '@/converters/spread'
import { SPREAD_GROUPS } from '@/converters/spread/options'
import { controlToOutput } from '@/converters/spread/plantResponse'
import { latinHypercube } from '@/converters/spread/random'
import { variablesOf } from '@/converters/spread/variables'
import { sampleAt, type Sample } from '@/converters/spread/variation'
import type { MarginSummary } from '@/converters/results'
import { angleBetween, expectRelative } from '@/tests/support/expectRelative'
import { buckDesign } from '@/tests/support/designs'
import { SPREAD_DESIGNS } from './designs'

const COUNT = 40

/** Samples over the whole of every tolerance, line and load. */
function samplesOf(name: string, count = COUNT): Sample[] {
  const design = parseDesign(SPREAD_DESIGNS[name])
  const variables = variablesOf(design, SPREAD_GROUPS)
  const cube = latinHypercube(count, variables.length, 3)
  const point = new Float64Array(variables.length)
  return Array.from({ length: count }, (_, i) => {
    cube.point(i, point)
    return sampleAt(
      design,
      variables,
      variables.map(({ low, high }, k) => low + point[k]! * (high - low)),
    )
  })
}

const nominalCircuit = (name: string) => {
  const design = parseDesign(SPREAD_DESIGNS[name])
  return buildCircuit(design, design.line.nominal, design.output.currentMaximum)
}

/** The accuracy that the product promises for margins: 0.1 %, 0.05°, 0.02 dB. */
function expectSameMargins(actual: MarginSummary, expected: MarginSummary, where: string): void {
  expect(actual.isStable, where).toBe(expected.isStable)
  const both = (key: 'crossover' | 'phaseMargin' | 'gainMargin') => {
    expect(actual[key] === null, `${key}, ${where}`).toBe(expected[key] === null)
    return actual[key] !== null && expected[key] !== null
  }
  if (both('crossover')) expectRelative(actual.crossover!, expected.crossover!, 1e-3)
  if (both('phaseMargin')) {
    expect(angleBetween(actual.phaseMargin!, expected.phaseMargin!), `phase margin, ${where}`).toBeLessThan(0.05)
  }
  if (both('gainMargin')) {
    expect(Math.abs(actual.gainMargin! - expected.gainMargin!), `gain margin, ${where}`).toBeLessThan(0.02)
  }
}

/** Least |1 + T|: every dip of a grid of 1000 points a decade, looked at again with 200 points. */
function denseModulusMargin(loopGain: LoopGain, switchingFrequency: number): number {
  const distance = (f: number) => {
    const { re, im } = loopGain(2 * Math.PI * f)
    return Math.hypot(1 + re, im)
  }
  const step = 10 ** 0.001
  const grid: number[] = []
  for (let f = switchingFrequency / 1e4; f <= switchingFrequency / 2; f *= step) grid.push(f)
  const values = grid.map(distance)
  const dips = grid.filter(
    (_, i) => values[i]! <= (values[i - 1] ?? Infinity) && values[i]! <= (values[i + 1] ?? Infinity),
  )
  const close = dips.flatMap((f) => Array.from({ length: 201 }, (_, k) => f * step ** (k / 100 - 1)))
  return Math.min(...values, ...close.filter((f) => f <= switchingFrequency / 2).map(distance))
}

describe.each(Object.keys(SPREAD_DESIGNS))('%s', (name) => {
  it('has circuits that a fresh reduction of the network also gives', () => {
    const member = circuitFamily(nominalCircuit(name))
    for (const { design, point } of samplesOf(name)) {
      const quick = member(design, point)
      const fresh = buildCircuit(design, point.lineVoltage, point.outputCurrent)
      expect(quick.outputStates).toEqual(fresh.outputStates)
      for (const interval of ['on', 'off'] as const) {
        for (const matrix of ['A', 'B', 'C', 'D'] as const) {
          fresh[interval][matrix].forEach((row, i) => {
            const largest = Math.max(...row.map(Math.abs))
            row.forEach((value, j) => {
              expect(Math.abs(quick[interval][matrix][i]![j]! - value)).toBeLessThanOrEqual(1e-9 * largest)
            })
          })
        }
      }
    }
  })

  it('has the control response that a full matrix inversion gives', () => {
    const member = circuitFamily(nominalCircuit(name))
    for (const { design, point } of samplesOf(name, 10)) {
      const { model } = averagedPoint(member(design, point), 0.5)
      const quick = controlToOutput(model)
      const full = modelResponses(model)
      const out = new Float64Array(2)
      for (let f = 1; f < design.switchingFrequency; f *= 3) {
        const expected = full(2 * Math.PI * f).controlToOutput
        quick(2 * Math.PI * f, out)
        const error = modulus(subtract(complex(out[0]!, out[1]), expected)) / modulus(expected)
        expect(error, `${f} Hz`).toBeLessThan(1e-7)
      }
    }
  })

  it.each(['averaged', 'switched'] as const)('has the margins of a fine reading of the same loop, %s', (model) => {
    const evaluate = evaluatorFor(parseDesign(SPREAD_DESIGNS[name]), model)
    samplesOf(name, model === 'averaged' ? COUNT : 8).forEach((sample, i) => {
      const evaluation = evaluate(sample) as Evaluation
      const plant = openPlant(sample.design, sample.point)
      const fine = readMargins(evaluation.loopGain, sample.design.switchingFrequency, {
        landmarks: plant.poles.filter(({ quality }) => (quality ?? 0) > 2).map(({ frequency }) => frequency),
        unstablePoles: plant.poles.filter(({ halfPlane }) => halfPlane === 'right').length,
      })
      expectSameMargins(evaluation.margins, fine, `sample ${i}`)
      const dense = denseModulusMargin(evaluation.loopGain, sample.design.switchingFrequency)
      expectRelative(evaluation.margins.modulusMargin, dense, 1e-3)
    })
  })

  it('has an averaged operating point and margins that differ from those about the exact orbit by its ripple alone', () => {
    const evaluate = evaluatorFor(parseDesign(SPREAD_DESIGNS[name]), 'averaged')
    samplesOf(name, 12).forEach((sample, i) => {
      const plant = openPlant(sample.design, sample.point)
      const expected = marginsOf(plant, requireNetwork(sample.design), 'averaged')
      const { conduction, dutyCycle, margins } = evaluate(sample) as Evaluation
      expect(conduction, `sample ${i}`).toBe(plant.orbit.conduction)
      // Ripple squared, relative: up to about a percent with these designs.
      expectRelative(dutyCycle, plant.orbit.dutyCycle, 0.01)
      expectRelative(margins.crossover!, expected.crossover!, 0.01)
      expect(angleBetween(margins.phaseMargin!, expected.phaseMargin!), `sample ${i}`).toBeLessThan(0.5)
    })
  })

  it('agrees with the analysis of each sample as a design of its own', () => {
    const evaluate = evaluatorFor(parseDesign(SPREAD_DESIGNS[name]), 'switched')
    samplesOf(name, 8).forEach((sample, i) => {
      const plant = openPlant(sample.design, sample.point)
      const expected = marginsOf(plant, requireNetwork(sample.design), 'switched')
      const evaluation = evaluate(sample) as Evaluation
      expect(evaluation.conduction).toBe(plant.orbit.conduction)
      expectRelative(evaluation.dutyCycle, plant.orbit.dutyCycle, 1e-9)
      expectSameMargins(evaluation.margins, expected, `sample ${i}`)
    })
  })
})

it('takes bias derating as a capacitor that is so much smaller', () => {
  const bank = { count: 4, capacitance: 47e-6, esr: 3e-3 }
  const derated = parseDesign(buckDesign({ outputCapacitors: [{ ...bank, biasDerating: 0.4 }] }))
  const smaller = parseDesign(buckDesign({ outputCapacitors: [{ ...bank, capacitance: 0.6 * 47e-6 }] }))
  const circuits = [derated, smaller].map((design) => buildCircuit(design, 12, 8))
  expectRelative(circuits[0]!.outputStates[0]!.capacitance, circuits[1]!.outputStates[0]!.capacitance, 1e-12)
  const resonances = [derated, smaller].map(
    (design) => analyse(design).plant.closedForms.find(({ key }) => key === 'resonance')!.value,
  )
  expectRelative(resonances[0]!, resonances[1]!, 1e-12)
  // Spread about what bias leaves, not about what is printed on the part.
  const margins = [derated, smaller].map((design) => runSpread(design, { samples: 100 }).distributions.crossover!.mean)
  expectRelative(margins[0]!, margins[1]!, 1e-6)
})

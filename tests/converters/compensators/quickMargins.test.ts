import { describe, expect, it } from 'vitest'
import { readCorners } from '@/converters/compensators/cornerMargins'
import { openCorners, plantPhase } from '@/converters/compensators/cornerPlants'
import { buildNetwork, type CompensatorChoice } from '@/converters/compensators/networks'
import { marginSlack, quickMargins } from '@/converters/compensators/quickMargins'
import { parseDesign } from '@/converters/parse'
import { logicRail, sensorBoost } from './designs'

const targets = { crossover: null, phaseMargin: 55, gainMargin: 10 }
const networks: readonly CompensatorChoice[] = [
  { type: 'I', parts: { C1: 47e-9 } },
  { type: 'I', parts: { C1: 1e-6 } },
  { type: 'II', parts: { R2: 12.1e3, C1: 39e-9, C2: 220e-12 } },
  { type: 'II', parts: { R2: 2.2e3, C1: 10e-9 } },
  { type: 'III', parts: { R2: 9.09e3, C1: 2.2e-9, C2: 39e-12, R3: 255, C3: 1.8e-9 } },
  { type: 'III', parts: { R2: 47e3, C1: 1e-9, C2: 33e-12, R3: 100, C3: 1e-9 } },
]

describe.each([
  ['the buck', logicRail],
  ['the boost', sensorBoost],
])('the quick reading of %s', (_, input) => {
  const design = parseDesign(input)
  const plants = openCorners(design)

  it('covers lowest, nominal and highest line at least and full load, nominal first', () => {
    const points = plants.corners.map(({ lineVoltage, outputCurrent }) => [lineVoltage, outputCurrent])
    expect(points[0]).toEqual([design.line.nominal, design.output.currentMaximum])
    expect(new Set(points.map(String)).size).toBe(6)
  })

  it.each(networks)('ranks $type $parts as the exact margins do', (choice) => {
    const network = buildNetwork(design, choice)
    const exact = readCorners(plants, network)
    const slack = Math.min(...exact.map((corner) => marginSlack(corner, targets)))
    const quick = quickMargins(plants, network, targets)
    // Interpolation between 40 points a decade; a hundredth of the target is half a degree or a tenth of a decibel.
    expect(Math.abs(quick.slack - slack)).toBeLessThan(0.02)
    const crossover = Math.max(...exact.map((corner) => corner.crossover ?? 0))
    if (crossover > 0) expect(quick.highestCrossover / (2 * Math.PI * crossover)).toBeCloseTo(1, 2)
  })

  it('follows the phase of the plant without jumps', () => {
    const phases = [1e3, 3e3, 10e3, 30e3, 100e3].map((f) => plantPhase(plants, plants.corners[0], 2 * Math.PI * f))
    // Every one of these plants lags more and more; a jump of 360° would show as a rise.
    phases.slice(1).forEach((phase, i) => expect(phase).toBeLessThan(phases[i]! + 5))
    expect(phases[0]).toBeGreaterThan(-120)
  })
})

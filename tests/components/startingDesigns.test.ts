import { describe, expect, it } from 'vitest'
import { startingDesign, WORKED_TOPOLOGIES } from '@/components/start/startingDesigns'
import { analyse, proposeCompensator } from '@/converters'
import { parseDesign } from '@/converters/parse'
import { beaconFlyback } from '@/db/seed/samples/beaconFlyback'
import { logicRail } from '@/db/seed/samples/logicRail'
import { vehicleSepic } from '@/db/seed/samples/vehicleSepic'

const cases = [
  ...WORKED_TOPOLOGIES.flatMap((topology) =>
    (['voltage-mode', 'peak-current-mode'] as const).map(
      (scheme) => [`${topology} in ${scheme}`, startingDesign(topology, scheme)] as const,
    ),
  ),
  ...[beaconFlyback, vehicleSepic].map((sample) => [sample.title, sample.design] as const),
]

describe.each(cases)('to begin with: %s', (_, input) => {
  const design = parseDesign(input)
  const { line, output } = design
  const corners = [line.minimum, line.nominal, line.maximum].flatMap((lineVoltage) =>
    [output.currentMinimum, output.currentMaximum].map((outputCurrent) => ({ lineVoltage, outputCurrent })),
  )

  it.each(corners)('computes without a warning at $lineVoltage V and $outputCurrent A', (point) => {
    const { operatingPoint, warnings } = analyse(design, { operatingPoint: point })
    // Those of a high voltage on purpose aside, a stage to begin with has nothing to be corrected.
    expect(warnings.filter(({ code }) => code !== 'hazardous-voltage')).toEqual([])
    expect(operatingPoint.efficiency).toBeGreaterThan(0.8)
  })
  it('gets a network whose worst corner is stable', () => {
    const { proposals, refusal } = proposeCompensator(design)
    expect(refusal).toBeNull()
    expect(proposals[0]?.margins.preferred.worst.isStable).toBe(true)
  })
})

it('a damped input filter leaves the output filter its pair of poles, and a network is proposed', () => {
  const design = parseDesign({
    ...logicRail.design,
    inputFilter: {
      inductance: 1e-6,
      resistance: 10e-3,
      capacitance: 22e-6,
      esr: 3e-3,
      dampingCapacitance: 11e-6,
      dampingResistance: 0.53,
    },
  })
  const roles = analyse(design).plant.poles.map(({ role }) => role)
  expect(roles.filter((role) => role === 'output-filter')).toHaveLength(2)
  expect(roles.filter((role) => role === 'input-filter')).toHaveLength(3)
  expect(proposeCompensator(design).proposals.length).toBeGreaterThan(0)
})

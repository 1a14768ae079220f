import { describe, expect, it } from 'vitest'
import { startingDesign, WORKED_TOPOLOGIES } from '@/components/start/startingDesigns'
import { analyse, proposeCompensator } from '@/converters'
import { parseDesign } from '@/converters/parse'
import { beaconFlyback } from '@/db/seed/samples/beaconFlyback'
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

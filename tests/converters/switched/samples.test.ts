/**
 * Responses computed elsewhere, in NumPy and SciPy, and confirmed there by injection into a cycle-by-cycle simulation:
 * tests/converters/fixtures/switched-response-samples.json. Held to the 0.02 dB and 0.1° that the engine promises.
 */
import { describe, expect, it } from 'vitest'
import { analyse } from '@/converters'
import type { LoadKind } from '@/converters/document'
import { angleBetween, expectRelative } from '@/tests/support/expectRelative'
import samples from '../fixtures/switched-response-samples.json'

const QUANTITIES = ['controlToOutput', 'lineToOutput', 'outputImpedance'] as const

describe.each(samples.cases.map((sample) => [sample.name, sample] as const))('%s', (_name, sample) => {
  const { lineVoltage, outputCurrent, frequencies } = sample
  const design = {
    ...sample.design,
    load: sample.load as LoadKind,
    line: { minimum: lineVoltage, nominal: lineVoltage, maximum: lineVoltage },
    output: { ...sample.design.output, currentMinimum: outputCurrent, currentMaximum: outputCurrent },
  }
  const { operatingPoint, responses } = analyse(design, { operatingPoint: { lineVoltage, outputCurrent }, frequencies })

  it('has the same duty cycle and conduction', () => {
    expectRelative(operatingPoint.dutyCycle, sample.dutyCycle, 1e-6)
    expect(operatingPoint.conduction).toBe(sample.conduction)
  })

  it.each(QUANTITIES)('has the same %s', (quantity) => {
    sample.switched[quantity].forEach((expected, i) => {
      const actual = responses[quantity].switched[i]!
      const where = `${quantity} at ${frequencies[i]} Hz`
      expect(Math.abs(actual.gainDb - expected.gainDb), where).toBeLessThan(0.02)
      expect(angleBetween(actual.phaseDeg, expected.phaseDeg), where).toBeLessThan(0.1)
    })
  })
})

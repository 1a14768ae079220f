import { describe, expect, it } from 'vitest'
import { analyse } from '@/converters'
import type { DesignDocumentInput } from '@/converters/document'
import { expectRelative } from '@/tests/support/expectRelative'

/** An ideal current-mode buck; 12 V gives 60 % duty at 7.2 V. */
function currentModeBuck(voltage: number, slopeCompensation: number): DesignDocumentInput {
  return {
    topology: 'buck',
    switchingFrequency: 200e3,
    line: { minimum: 12, nominal: 12, maximum: 12 },
    output: { voltage, currentMinimum: 5, currentMaximum: 5 },
    inductor: { inductance: 10e-6 },
    outputCapacitors: [{ count: 1, capacitance: 0.02 }],
    rectifier: { kind: 'synchronous' },
    modulator: { kind: 'peak-current-mode', currentSenseResistance: 0.1, slopeCompensation },
  }
}

describe('stability of the orbit in peak current mode', () => {
  it.each([0.3, 0.45, 0.55, 0.7])('has the multiplier −(m₂ − m_c)/(m₁ + m_c) at duty %s', (duty) => {
    // Common knowledge since Middlebrook and Hsu (1970s): a disturbance of the current is multiplied by this each period.
    const voltage = 12 * duty
    const rising = (0.1 * (12 - voltage)) / 10e-6
    const falling = (0.1 * voltage) / 10e-6
    for (const slope of [0, 20e3, 60e3]) {
      const { periodMap } = analyse(currentModeBuck(voltage, slope))
      const expected = -(falling - slope) / (rising + slope)
      const nearest = periodMap.multipliers.reduce((best, m) =>
        Math.abs(m.real - expected) < Math.abs(best.real - expected) ? m : best,
      )
      // The finite capacitor lets the output move by parts in ten thousand within a period.
      expect(Math.abs(nearest.real - expected)).toBeLessThan(1e-3)
      expect(periodMap.isStable).toBe(Math.abs(expected) < 1)
    }
  })

  it('names the slope that cures 60 % duty, and with it the orbit is stable', () => {
    // Ridley 1991: the pair is damped from m_c·D′ = ½ on, that is S_e = (S_f − S_n)/2.
    const rising = (0.1 * 4.8) / 10e-6
    const falling = (0.1 * 7.2) / 10e-6
    const { periodMap, warnings } = analyse(currentModeBuck(7.2, 0))
    expect(periodMap.isStable).toBe(false)
    expectRelative(periodMap.slopeNeeded!, (falling - rising) / 2, 2e-3)
    const warning = warnings.find(({ code }) => code === 'subharmonic-oscillation')!
    expect(warning.message).toMatch(/half the switching frequency.*12000 V\/s/)
    expect(warning.field).toBe('modulator.slopeCompensation')
    expect(analyse(currentModeBuck(7.2, periodMap.slopeNeeded! * 1.01)).periodMap.isStable).toBe(true)
  })
})

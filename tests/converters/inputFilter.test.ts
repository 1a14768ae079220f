/** [M76] is Middlebrook, "Input filter considerations in design and application of switching regulators", IAS 1976. */
import { describe, expect, it } from 'vitest'
import { analyse, DesignError } from '@/converters'
import { filterImpedance, suggestDamping } from '@/converters/inputFilter'
import {
  add,
  complex,
  decibels,
  divide,
  argumentDeg,
  modulus,
  multiply,
  type Complex,
} from '@/converters/numeric/complex'
import type { ResponseCurve } from '@/converters/results'
import { boostDesign, buckDesign } from '@/tests/support/designs'
import { angleBetween, expectRelative } from '@/tests/support/expectRelative'

const filter = { inductance: 4.7e-6, resistance: 0.01, capacitance: 22e-6, esr: 2e-3 }
const damped = { ...filter, dampingCapacitance: 100e-6, dampingResistance: 0.3 }
const point = (curve: ResponseCurve, i: number): Complex => {
  const { gainDb, phaseDeg } = curve[i]!
  const size = 10 ** (gainDb / 20)
  const angle = (phaseDeg * Math.PI) / 180
  return complex(size * Math.cos(angle), size * Math.sin(angle))
}

describe('an input filter', () => {
  it('meets a converter that looks like a negative resistance, −V_g/I_g, while its output is held still', () => {
    // [M76]: constant power in. The switched model has the same limit at low frequency.
    const { inputFilter } = analyse(
      buckDesign({
        inputFilter: filter,
        switch: { onResistance: 0 },
        inductor: { inductance: 2.2e-6 },
        rectifier: { kind: 'synchronous' },
      }),
    )
    const expected = 12 ** 2 / (3.3 * 8)
    expectRelative(10 ** (inputFilter!.nullImpedance[0]!.gainDb / 20), expected, 1e-3)
    expect(angleBetween(inputFilter!.nullImpedance[0]!.phaseDeg, 180)).toBeLessThan(0.5)
  })

  it.each([
    ['buck', buckDesign({ inputFilter: damped })],
    ['boost', boostDesign({ inputFilter: damped })],
  ])('changes the plant by (1 + Z/Z_N)/(1 + Z/Z_D), as the extra element theorem says: %s', (_name, design) => {
    const check = analyse(design).inputFilter!
    const low = check.frequencies.filter((f) => f > 100 && f < design.switchingFrequency / 20)
    const withFilter = analyse(design, { frequencies: low }).responses.controlToOutput.switched
    const without = analyse({ ...design, inputFilter: null }, { frequencies: low }).responses.controlToOutput.switched
    low.forEach((f, i) => {
      const at = check.frequencies.indexOf(f)
      const Z = point(check.filterImpedance, at)
      const factor = divide(
        add(complex(1), divide(Z, point(check.nullImpedance, at))),
        add(complex(1), divide(Z, point(check.openLoopImpedance, at))),
      )
      const expected = multiply(point(without, i), factor)
      expect(Math.abs(withFilter[i]!.gainDb - decibels(expected))).toBeLessThan(0.15)
      expect(angleBetween(withFilter[i]!.phaseDeg, argumentDeg(expected))).toBeLessThan(1)
    })
  })

  it('without damping is found too near, and the suggested branch keeps it half as high as the converter', () => {
    const sharp = { ...filter, resistance: 1e-3, esr: 1e-3 }
    const { inputFilter, warnings, margins } = analyse(buckDesign({ inputFilter: sharp }))
    const { suggestion } = inputFilter!
    expect(inputFilter!.margin).toBeLessThan(6)
    expect(warnings.map(({ code }) => code)).toContain('input-filter')
    const cured = analyse(
      buckDesign({
        inputFilter: {
          ...sharp,
          dampingCapacitance: suggestion!.dampingCapacitance,
          dampingResistance: suggestion!.dampingResistance,
        },
      }),
    )
    expect(cured.inputFilter!.margin).toBeGreaterThan(5.5)
    expect(cured.margins!.isStable).toBe(true)
    const bare = analyse(buckDesign()).margins!
    expect(Math.abs(cured.margins!.phaseMargin! - bare.phaseMargin!)).toBeLessThan(3)
    expect(margins).not.toBeNull()
  })

  it("damped at the optimum has the book's peak, and any other resistor a higher one", () => {
    const ideal = { inductance: 10e-6, resistance: 0, capacitance: 10e-6, esr: 0 }
    const suggestion = suggestDamping(ideal, ({ dampingCapacitance }) => dampingCapacitance! > 39e-6)
    const peak = (share: number) => {
      const branch = {
        dampingCapacitance: suggestion.dampingCapacitance,
        dampingResistance: suggestion.dampingResistance * share,
      }
      let most = 0
      for (let f = 500; f < 1e6; f *= 1.002) {
        most = Math.max(most, modulus(filterImpedance({ ...ideal, ...branch }, 2 * Math.PI * f)))
      }
      return most
    }
    expectRelative(peak(1), suggestion.peakImpedance, 1e-3)
    expect(peak(0.8)).toBeGreaterThan(1.01 * peak(1))
    expect(peak(1.25)).toBeGreaterThan(1.01 * peak(1))
  })

  it('works in discontinuous conduction too', () => {
    const design = boostDesign({ inputFilter: damped })
    const { operatingPoint, inputFilter } = analyse(design, { operatingPoint: { outputCurrent: 0.05 } })
    expect(operatingPoint.conduction).toBe('discontinuous')
    expect(inputFilter!.margin).toBeGreaterThan(0)
  })

  it('with a damping capacitor and no resistor is refused at the resistor', () => {
    const design = buckDesign({ inputFilter: { ...filter, dampingCapacitance: 47e-6 } })
    expect(() => analyse(design)).toThrow(DesignError)
    expect(() => analyse(design)).toThrow(/resistor/)
  })
})

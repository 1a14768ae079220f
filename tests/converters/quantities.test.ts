import * as fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { formatQuantity, parseQuantity, UNITS, type Unit } from '@/converters/quantities'

const valueOf = (text: string, unit: Unit) => {
  const parsed = parseQuantity(text, unit)
  return parsed.kind === 'value' ? parsed.value : parsed.message
}

describe('a quantity as engineers type it', () => {
  it.each<[string, Unit, number]>([
    ['4.7u', 'H', 4.7e-6],
    ['4u7', 'H', 4.7e-6],
    ['22 µF', 'F', 22e-6], // U+00B5
    ['22 μF', 'F', 22e-6], // U+03BC
    ['4.7 uF', 'F', 4.7e-6],
    ['100NF', 'F', 100e-9],
    ['4u7F', 'F', 4.7e-6],
    ['2k2', 'Ω', 2200],
    ['2K2', 'Ω', 2200], // IEC 60062 writes kilo as K
    ['0R01', 'Ω', 0.01],
    ['R47', 'Ω', 0.47],
    ['1M5', 'Ω', 1.5e6],
    ['10 k\u2126', 'Ω', 10e3], // the ohm sign
    ['10 kohm', 'Ω', 10e3],
    ['1,5 m', 'H', 1.5e-3],
    ['1.5mH', 'H', 1.5e-3],
    ['0,500', 'V', 0.5],
    ['10 kHz', 'Hz', 10e3],
    ['10 KHZ', 'Hz', 10e3],
    ['3V3', 'V', 3.3],
    ['1e-6', 'F', 1e-6],
    ['1.5E3', 'Hz', 1500],
    ['−5', 'V', -5], // U+2212
    ['+5 V', 'V', 5],
    ['12 %', '%', 0.12],
    ['12', '%', 0.12],
    ['22\u2009µF', 'F', 22e-6],
    ['10\u202f000 Hz', 'Hz', 10e3],
    ['1,234.5', 'V', 1234.5],
    ['1.234,5', 'V', 1234.5],
    ['60 kV/s', 'V/s', 60e3],
    ['60 mV/µs', 'V/s', 60e3],
    ['0.3 V / us', 'V/s', 0.3e6],
    ['1 mS', 'S', 1e-3],
    ['1 mA/V', 'S', 1e-3],
    ['20 ms', 's', 20e-3],
    ['55°', '°', 55],
    ['10 dB', 'dB', 10],
    ['10k', '', 10e3],
    ['  .5 ', 'A', 0.5],
  ])('%s in a field for %s is %d', (text, unit, value) => {
    expect(valueOf(text, unit)).toBe(value)
  })

  it.each<[string, Unit, RegExp]>([
    ['4.7 µF', 'H', /^That is a capacitance; this field needs an inductance, for example 4\.7 µH\.$/],
    ['3V3', 'H', /That is a voltage/],
    ['1 ms', 'S', /That is a time/],
    ['1 mS', 's', /That is a transconductance/],
    ['4.7u', '%', /A prefix does not go with a percentage/],
    ['', 'V', /^Enter a voltage, for example 3\.3 V\.$/],
    ['   ', 'V', /^Enter a voltage/],
    ['plenty', 'V', /not a number/],
    ['NaN', 'V', /not a number/],
    ['Infinity', 'V', /not a number/],
    ['--5', 'V', /not a number/],
    ['3 parrots', 'V', /parrots is not a unit known here/],
    ['5 constructor', 'V', /not a unit/],
    ['0x10', 'V', /not a unit/],
    ['1e400', 'Hz', /too large/],
    ['1e308 k', 'Hz', /too large/],
    ['1e-400', 'V', /too small/],
    ['1,500.2.3', 'V', /do not make one number/],
    ['1,500', 'V', /1,500 can mean 1\.500 or 1500/],
    ['1 00', 'V', /do not make one number/],
    ['10 MH', 'H', /milli.*mega.*Write 10 mH/],
    ['500 mHz', 'Hz', /milli.*mega.*Write 500 MHz/],
    ['9'.repeat(10_000), 'V', /too long/],
  ])('%s in a field for %s is explained', (text, unit, message) => {
    expect(valueOf(text, unit)).toMatch(message)
  })

  it('of any text is a finite value or a sentence', () => {
    const characters = fc.constantFrom(...'0123456789.,-−+eEkKmMuµnpRVFHΩ%/s \u2009xyz')
    const text = fc.oneof(
      fc.string(),
      fc.array(characters, { maxLength: 12 }).map((letters) => letters.join('')),
    )
    fc.assert(
      fc.property(text, fc.constantFrom(...UNITS), (typed, unit) => {
        const parsed = parseQuantity(typed, unit)
        if (parsed.kind === 'value') expect(Number.isFinite(parsed.value)).toBe(true)
        else expect(parsed.message).toMatch(/\.$/)
      }),
      { numRuns: 2000 },
    )
  })
})

describe('a quantity written for people', () => {
  // Prefixes: IEC 80000-1, table of decimal prefixes.
  it.each<[number, Unit, string]>([
    [4.7e-6, 'H', '4.70 µH'],
    [41.66e3, 'Hz', '41.7 kHz'],
    [10e3, 'Ω', '10.0 kΩ'],
    [3.3, 'V', '3.30 V'],
    [0.5e-12, 'F', '500 fF'],
    [999.96e-6, 'H', '1.00 mH'],
    [999.4e3, 'Hz', '999 kHz'],
    [999.5e3, 'Hz', '1.00 MHz'],
    [2e12, 'Hz', '2.00 THz'],
    [0, 'A', '0 A'],
    [-0, 'A', '0 A'],
    [-3.3, 'V', '−3.30 V'],
    [0.2, '%', '20.0 %'],
    [54.96, '°', '55.0°'],
    [99.97, 'dB', '100 dB'],
    [0.45, '', '0.450'],
    [12345, '', '12300'],
    [1e20, 'Hz', '1.00e20 Hz'],
    [NaN, 'V', '–'],
    [Infinity, 'V', '–'],
  ])('%d %s is %s', (value, unit, text) => {
    expect(formatQuantity(value, unit)).toBe(text)
  })

  it('has as many figures as asked for', () => {
    expect(formatQuantity(4.7e-6, 'H', 2)).toBe('4.7 µH')
    expect(formatQuantity(47e-6, 'H', 5)).toBe('47.000 µH')
  })

  it('can be typed back: the same value within its rounding, and the same text again', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -16, max: 15, noNaN: true }),
        fc.boolean(),
        fc.constantFrom(...UNITS),
        fc.integer({ min: 2, max: 8 }),
        (exponent, negative, unit, digits) => {
          const value = (negative ? -1 : 1) * 10 ** exponent
          const text = formatQuantity(value, unit, digits)
          const parsed = parseQuantity(text, unit)
          if (parsed.kind === 'problem') throw new Error(`${text}: ${parsed.message}`)
          // Half a unit of the last figure, relative to a mantissa that is at least 1.
          expect(Math.abs(parsed.value / value - 1)).toBeLessThanOrEqual(0.5000001 * 10 ** (1 - digits))
          expect(formatQuantity(parsed.value, unit, digits)).toBe(text)
        },
      ),
      { numRuns: 2000 },
    )
  })
})

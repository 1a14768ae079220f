import * as fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { csvText } from '@/components/plots/save'
import { readDesignText } from '@/hooks/designText'
import { decodeText, encodeText } from '@/hooks/linkCodec'

describe('a design in a link', () => {
  it('comes back as it went, whatever it holds', async () => {
    await fc.assert(
      fc.asyncProperty(fc.string({ unit: 'grapheme', maxLength: 2_000 }), async (text) => {
        expect(await decodeText(await encodeText(text))).toBe(text)
      }),
      { numRuns: 60 },
    )
  })
  it('uses only characters that an address keeps (RFC 3986, unreserved)', async () => {
    expect(await encodeText('{"name":"Ω µ ☂"}')).toMatch(/^[A-Za-z0-9_-]+$/)
  })
  it('is refused when it is cut short', async () => {
    const code = await encodeText(JSON.stringify({ topology: 'buck', notes: 'x'.repeat(500) }))
    await expect(decodeText(code.slice(0, -6))).rejects.toThrow('damaged or incomplete')
  })
  it('is refused when it unpacks to more than a design can be', async () => {
    const bomb = await encodeText('0'.repeat(2_000_000))
    expect(bomb.length).toBeLessThan(10_000)
    await expect(decodeText(bomb)).rejects.toThrow('more than a design can be')
  })
  it.each(['', '!!!', 'AAAA'])('refuses %s in words', async (code) => {
    await expect(decodeText(code)).rejects.toThrow(RangeError)
  })
})

describe('a design as text', () => {
  it('names the field that is wrong', () => {
    const read = readDesignText('{"topology":"buck","switchingFrequency":"fast"}')
    expect(read.kind === 'problems' && read.problems.map((problem) => problem.field)).toContain('switchingFrequency')
  })
  it('says when it is no JSON', () => {
    expect(readDesignText('{"topology":')).toMatchObject({ kind: 'problems' })
  })
})

it('writes CSV as RFC 4180 says', () => {
  expect(
    csvText(
      ['Hz', 'gain, dB'],
      [
        [10, null],
        [20, -3.5],
      ],
    ),
  ).toBe('Hz,"gain, dB"\r\n10,\r\n20,-3.5\r\n')
})

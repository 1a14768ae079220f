import { describe, expect, it } from 'vitest'
import { dark, light, sizes, type Palette } from '@/constants/theme'

/** Relative luminance and contrast: WCAG 2.2, definitions of "relative luminance" and "contrast ratio". */
function luminance(hex: string): number {
  const channels = [1, 3, 5].map((at) => Number.parseInt(hex.slice(at, at + 2), 16) / 255)
  const [r, g, b] = channels.map((c) => (c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4)) as [
    number,
    number,
    number,
  ]
  return 0.2126 * r + 0.7152 * g + 0.0722 * b
}
function contrast(a: string, b: string): number {
  const [dim, bright] = [luminance(a), luminance(b)].sort((x, y) => x - y) as [number, number]
  return (bright + 0.05) / (dim + 0.05)
}

it('measures contrast as the standard does', () => {
  expect(contrast('#000000', '#FFFFFF')).toBeCloseTo(21, 6)
})

describe.each([
  ['light', light],
  ['dark', dark],
] as const)('the %s set', (_, theme: Palette) => {
  const grounds = ['paper', 'sheet'] as const

  it('has text of at least 4.5:1 on paper and sheet (WCAG 2.2, 1.4.3)', () => {
    for (const ground of grounds) {
      for (const ink of ['ink', 'quiet', 'accent', 'gain', 'phase', 'holds', 'tight', 'short'] as const) {
        expect(contrast(theme[ink], theme[ground]), `${ink} on ${ground}`).toBeGreaterThanOrEqual(4.5)
      }
    }
    expect(contrast(theme.onAccent, theme.accent)).toBeGreaterThanOrEqual(4.5)
    expect(contrast(theme.ink, theme.tightWash)).toBeGreaterThanOrEqual(4.5)
    expect(contrast(theme.ink, theme.shortWash)).toBeGreaterThanOrEqual(4.5)
    // Drawings write the roots' names over the half plane that grows.
    expect(contrast(theme.gain, theme.shortWash)).toBeGreaterThanOrEqual(4.5)
    expect(contrast(theme.quiet, theme.shortWash)).toBeGreaterThanOrEqual(4.5)
  })

  it('has edges of controls of at least 3:1 on paper and sheet (WCAG 2.2, 1.4.11)', () => {
    for (const ground of grounds) expect(contrast(theme.edge, theme[ground])).toBeGreaterThanOrEqual(3)
  })
})

it('sets nothing under 13 px', () => {
  expect(Math.min(...Object.values(sizes))).toBeGreaterThanOrEqual(13)
})

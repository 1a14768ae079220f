import { describe, expect, it } from 'vitest'
import { placeOf, planeOf, radiusShare, upperHalf } from '@/components/plots/sPlane'
import type { Root } from '@/converters/results'

function root(real: number, imaginary: number): Root {
  const modulus = Math.hypot(real, imaginary)
  return {
    real,
    imaginary,
    frequency: modulus / (2 * Math.PI),
    dampingRatio: -real / modulus,
    quality: null,
    timeConstant: null,
    ringingFrequency: Math.abs(imaginary) / (2 * Math.PI),
    halfPlane: real < 0 ? 'left' : 'right',
    role: 'other',
  }
}

describe('the s-plane', () => {
  const slow = root(-2 * Math.PI * 100, 0)
  const fast = root(-2 * Math.PI * 3e5, 2 * Math.PI * 4e5)
  const plane = planeOf([slow, fast])

  it('keeps the direction of every root, which is its damping', () => {
    const { x, y } = placeOf(plane, fast)
    expect(y / x).toBeCloseTo(-4 / 3)
  })
  it('shows decades as equal distances', () => {
    const step = radiusShare(plane, 1e4) - radiusShare(plane, 1e3)
    expect(radiusShare(plane, 1e5) - radiusShare(plane, 1e4)).toBeCloseTo(step)
  })
  it('holds every root, away from the centre and from the edge', () => {
    for (const item of [slow, fast]) {
      const { x, y } = placeOf(plane, item)
      expect(Math.hypot(x, y)).toBeGreaterThan(0)
      expect(Math.hypot(x, y)).toBeLessThan(1)
    }
  })
  it('draws a pair once', () => {
    expect(upperHalf([root(-1, 1), root(-1, -1), root(-2, 0)])).toHaveLength(2)
  })
  it('puts a right-half-plane root on the right', () => {
    expect(placeOf(plane, root(2 * Math.PI * 1e4, 0)).x).toBeGreaterThan(0)
  })
})

/** Poles and zeros as people read them: frequency, damping, what each means in time, and where it comes from. */
import type { Complex } from './numeric/complex'
import type { Root, RootRole } from './results'

/** Below this share of |s|, a real or imaginary part is round-off. */
const NEGLIGIBLE = 1e-9

export function describeRoot({ re, im }: Complex, role: RootRole): Root {
  const size = Math.hypot(re, im)
  const isReal = Math.abs(im) <= NEGLIGIBLE * size
  const onAxis = Math.abs(re) <= NEGLIGIBLE * size
  return {
    real: onAxis ? 0 : re,
    imaginary: isReal ? 0 : im,
    frequency: size / (2 * Math.PI),
    dampingRatio: size === 0 ? 0 : -re / size,
    quality: isReal || onAxis ? null : size / (2 * Math.abs(re)),
    timeConstant: onAxis ? null : 1 / Math.abs(re),
    ringingFrequency: isReal ? 0 : Math.abs(im) / (2 * Math.PI),
    halfPlane: onAxis ? 'axis' : re > 0 ? 'right' : 'left',
    role,
  }
}

/** Describes roots sorted by frequency, conjugates adjacent with the positive imaginary part first. */
export function describeRoots(roots: readonly Complex[], roleOf: (root: Complex) => RootRole): Root[] {
  return roots
    .map((root) => describeRoot(root, roleOf(root)))
    .sort((a, b) => a.frequency - b.frequency || b.imaginary - a.imaginary)
}

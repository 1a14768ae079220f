/**
 * The s-plane with its angles kept and its distances taken logarithmically: the direction from the origin shows the damping
 * exactly, the distance shows the frequency in decades, so that roots decades apart stand on one picture. Each
 * conjugate pair is shown by its upper member.
 */
import type { Root } from '@/converters/results'

export interface PlaneRoot {
  readonly root: Root
  readonly kind: 'pole' | 'zero'
  readonly owner: 'stage' | 'loop'
}

export interface Plane {
  /** Decades of frequency that the rings stand for, Hz: from the innermost to the outermost. */
  readonly rings: readonly number[]
  readonly lowest: number // log10 of Hz at the centre
  readonly decades: number
}

const FEWEST_DECADES = 2

/** Rings that hold every root. The centre stands for a decade below the slowest root. */
export function planeOf(roots: readonly PlaneRoot[]): Plane {
  const exponents = roots
    .map(({ root }) => root.frequency)
    .filter((hertz) => hertz > 0)
    .map(Math.log10)
  const least = exponents.length === 0 ? 2 : Math.min(...exponents)
  const greatest = exponents.length === 0 ? 5 : Math.max(...exponents)
  const lowest = Math.floor(least - 0.35)
  const highest = Math.max(lowest + FEWEST_DECADES, Math.ceil(greatest + 0.1))
  const rings = Array.from({ length: highest - lowest }, (_, index) => 10 ** (lowest + 1 + index))
  return { rings, lowest, decades: highest - lowest }
}

/** Share of the radius at which a frequency lies; the origin itself is at 0. */
export function radiusShare(plane: Plane, frequency: number): number {
  if (frequency <= 0) return 0
  return Math.min(1, Math.max(0, (Math.log10(frequency) - plane.lowest) / plane.decades))
}

/** Position in the unit half disc: x to the right, y upwards. */
export function placeOf(plane: Plane, root: Root): { readonly x: number; readonly y: number } {
  const share = radiusShare(plane, root.frequency)
  const modulus = Math.hypot(root.real, root.imaginary)
  if (modulus === 0) return { x: 0, y: 0 }
  return { x: (share * root.real) / modulus, y: (share * Math.abs(root.imaginary)) / modulus }
}

/** One of each conjugate pair, and the real ones. */
export function upperHalf(roots: readonly Root[]): Root[] {
  return roots.filter((root) => root.imaginary >= 0)
}

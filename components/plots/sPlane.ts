/**
 * The s-plane with its angles kept and its distances taken logarithmically: the direction from the origin shows the damping
 * exactly, the distance shows the frequency in decades, so that roots decades apart stand on one picture. Each
 * conjugate pair is shown by its upper member.
 */
import type { Root } from '@/converters/results'

/** A place on the plane: a root without its meaning. */
export type PlanePoint = Pick<Root, 'real' | 'imaginary' | 'frequency'>

export function pointOf({ real, imaginary }: Pick<Root, 'real' | 'imaginary'>): PlanePoint {
  return { real, imaginary, frequency: Math.hypot(real, imaginary) / (2 * Math.PI) }
}

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

/** Rings that hold every point. The centre stands for a decade below the slowest. */
export function planeOf(points: readonly PlanePoint[]): Plane {
  const exponents = points
    .map(({ frequency }) => frequency)
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
export function placeOf(plane: Plane, root: PlanePoint): { readonly x: number; readonly y: number } {
  const share = radiusShare(plane, root.frequency)
  const modulus = Math.hypot(root.real, root.imaginary)
  if (modulus === 0) return { x: 0, y: 0 }
  return { x: (share * root.real) / modulus, y: (share * Math.abs(root.imaginary)) / modulus }
}

/** One of each conjugate pair, and the real ones. */
export function upperHalf(roots: readonly Root[]): Root[] {
  return roots.filter((root) => root.imaginary >= 0)
}

/** As many of the points as can be told apart: one for each cell of a grid of `cells` along the radius. */
export function thinned(points: readonly PlanePoint[], plane: Plane, cells: number): PlanePoint[] {
  const kept = new Map<string, PlanePoint>()
  for (const point of points) {
    const { x, y } = placeOf(plane, point)
    const cell = `${Math.round(x * cells)} ${Math.round(y * cells)}`
    if (!kept.has(cell)) kept.set(cell, point)
  }
  return [...kept.values()]
}

/** The parts of a branch that lie on the rings; beyond them it is not drawn. */
export function partsOnPlane(branch: readonly PlanePoint[], plane: Plane): PlanePoint[][] {
  const parts: PlanePoint[][] = []
  let isOn = false
  for (const point of branch) {
    const exponent = Math.log10(point.frequency)
    const isInside = exponent >= plane.lowest && exponent <= plane.lowest + plane.decades
    if (isInside && !isOn) parts.push([])
    if (isInside) parts.at(-1)?.push(point)
    isOn = isInside
  }
  return parts.filter((part) => part.length > 1)
}

/**
 * The figures of `readMargins` for thousands of loops: a coarse grid that is refined only where the loop gain turns,
 * then a bracketed search for each crossing. No logarithm or angle is taken but at the crossings themselves.
 */
import { findRoot } from '../numeric/rootFinding'
import type { MarginSummary } from '../results'
import type { ResponseInto } from './plantResponse'

export interface LoopShape {
  /** Hz, near which the curve bends sharply. */
  readonly landmarks: readonly number[]
  /** Poles of the open loop in the right half plane. */
  readonly unstablePoles: number
}

/** Where nothing but integrator and amplifier pole are, few points do. */
const REGIONS = [
  { from: 1e-6, to: 1e-4, perDecade: 4 }, // shares of the switching frequency
  { from: 1e-4, to: 0.5, perDecade: 8 },
] as const
/** A step that turns the loop gain by more than 45° is halved, this often at most. */
const LARGEST_TURN = Math.cos(Math.PI / 4)
const MOST_HALVINGS = 6
/** Relative width, in log ω, at which a crossing is found well enough. */
const CLOSE = 1e-7

/** Samples of one loop, in buffers that are used again for the next. */
interface Walk {
  /** Real and imaginary part of the last reading. */
  readonly out: Float64Array
  length: number
  omega: Float64Array
  re: Float64Array
  im: Float64Array
}

/** @param switchingFrequency - Hz, of all loops that will be read. */
export function marginReader(switchingFrequency: number): (loopGain: ResponseInto, shape: LoopShape) => MarginSummary {
  const grid = gridUpTo(switchingFrequency)
  const walk: Walk = { out: new Float64Array(2), length: 0, ...buffers(16 * grid.length) }
  const merged = new Float64Array(grid.length + MOST_LANDMARKS * AROUND.length)
  return function read(loopGain, { landmarks, unstablePoles }) {
    walkLoop(loopGain, withLandmarks(grid, landmarks, merged), walk)
    const { phaseMargins, crossover } = gainCrossings(loopGain, walk)
    const { gainMargin, encirclements } = phaseCrossings(loopGain, walk)
    // A loop gain that is negative at standstill passes the axis there too, once for both halves.
    loopGain(0, walk.out)
    const passage = walk.out[0]! < -1 ? (walk.im[0]! < 0 ? -1 : 1) : 0
    // Gain left at half the switching frequency meets its own sampled image there.
    const isStable = square(walk, walk.length - 1) < 1 && unstablePoles + 2 * encirclements + passage === 0
    return {
      crossover,
      phaseMargin:
        phaseMargins.length === 0 ? null : Math.min(...(isStable ? phaseMargins.map(Math.abs) : phaseMargins)),
      gainMargin,
      modulusMargin: closestApproach(loopGain, walk),
      isStable,
    }
  }
}

/** rad/s, ascending up to half the switching frequency. */
function gridUpTo(switchingFrequency: number): Float64Array {
  const scale = 2 * Math.PI * switchingFrequency
  const points = REGIONS.flatMap(({ from, to, perDecade }) => {
    const steps = Math.ceil(Math.log10(to / from) * perDecade)
    return Array.from({ length: steps }, (_, i) => scale * from * (to / from) ** (i / steps))
  })
  return Float64Array.from([...points, scale / 2])
}

const buffers = (capacity: number): Pick<Walk, 'omega' | 're' | 'im'> => ({
  omega: new Float64Array(capacity),
  re: new Float64Array(capacity),
  im: new Float64Array(capacity),
})

const square = ({ re, im }: Walk, i: number): number => re[i]! * re[i]! + im[i]! * im[i]!

function gainCrossings(loopGain: ResponseInto, walk: Walk): { phaseMargins: number[]; crossover: number | null } {
  const { out } = walk
  const phaseMargins: number[] = []
  let crossover: number | null = null
  let above = square(walk, 0) > 1
  for (let i = 1; i < walk.length; i++) {
    const wasAbove = above
    above = square(walk, i) > 1
    if (above === wasAbove) continue
    const at = rootBetween(walk.omega[i - 1]!, walk.omega[i]!, (omega) => {
      loopGain(omega, out)
      return Math.log(out[0]! * out[0]! + out[1]! * out[1]!)
    })
    crossover = at / (2 * Math.PI)
    loopGain(at, out)
    phaseMargins.push(wrap(180 + (180 / Math.PI) * Math.atan2(out[1]!, out[0]!)))
  }
  return { phaseMargins, crossover }
}

function phaseCrossings(
  loopGain: ResponseInto,
  { out, length, omega, re, im }: Walk,
): { gainMargin: number | null; encirclements: number } {
  let gainMargin: number | null = null
  let encirclements = 0
  for (let i = 1; i < length; i++) {
    const downwards = im[i]! < 0
    if (im[i - 1]! < 0 === downwards || !(re[i - 1]! < 0 || re[i]! < 0)) continue
    const at = rootBetween(omega[i - 1]!, omega[i]!, (w) => {
      loopGain(w, out)
      return out[1]!
    })
    loopGain(at, out)
    const real = out[0]!
    // Each passage left of −1 is half an encirclement there, and half at the negative frequencies.
    if (real < -1) encirclements += downwards ? -1 : 1
    else if (real < 0) gainMargin = Math.min(gainMargin ?? Infinity, -20 * Math.log10(-real))
  }
  return { gainMargin, encirclements }
}

const wrap = (degrees: number): number => degrees - 360 * Math.ceil((degrees - 180) / 360)

function rootBetween(low: number, high: number, f: (omega: number) => number): number {
  return Math.exp(findRoot((logOmega) => f(Math.exp(logOmega)), Math.log(low), Math.log(high), CLOSE))
}

/** Shares of a landmark at which the loop is looked at; a sharper bend between them is found by its turn. */
const AROUND: readonly number[] = [0.97, 0.99, 1, 1.01, 1.03]

/** A power stage has fewer states than would make so many lightly damped pairs. */
const MOST_LANDMARKS = 16

/** The grid with its landmarks, written into `merged`. */
function withLandmarks(grid: Float64Array, landmarks: readonly number[], merged: Float64Array): Float64Array {
  if (landmarks.length === 0) return grid
  const last = grid[grid.length - 1]!
  const extra: number[] = []
  for (let k = 0; k < Math.min(landmarks.length, MOST_LANDMARKS); k++) {
    for (const share of AROUND) {
      const omega = 2 * Math.PI * landmarks[k]! * share
      if (omega > grid[0]! && omega < last) extra.push(omega)
    }
  }
  if (landmarks.length > 1) extra.sort((a, b) => a - b)
  let taken = 0
  for (let i = 0, k = 0; i < grid.length + extra.length; i++) {
    const isExtra = k < extra.length && extra[k]! < grid[taken]!
    merged[i] = isExtra ? extra[k++]! : grid[taken++]!
  }
  return merged.subarray(0, grid.length + extra.length)
}

function walkLoop(loopGain: ResponseInto, grid: Float64Array, walk: Walk): void {
  const { out } = walk
  walk.length = 0
  loopGain(grid[0]!, out)
  keep(walk, grid[0]!, out[0]!, out[1]!)
  for (let i = 1; i < grid.length; i++) {
    loopGain(grid[i]!, out)
    stepTo(loopGain, walk, grid[i]!, out[0]!, out[1]!, MOST_HALVINGS)
  }
}

/** Goes on from the last sample that was kept to T = re + j·im at ω. */
function stepTo(loopGain: ResponseInto, walk: Walk, omega: number, re: number, im: number, halvings: number): void {
  const last = walk.length - 1
  const fromRe = walk.re[last]!
  const fromIm = walk.im[last]!
  const turn = fromRe * re + fromIm * im
  const sizes = Math.sqrt((fromRe * fromRe + fromIm * fromIm) * (re * re + im * im))
  if (halvings === 0 || turn >= LARGEST_TURN * sizes) {
    keep(walk, omega, re, im)
    return
  }
  const middle = Math.sqrt(walk.omega[last]! * omega)
  loopGain(middle, walk.out)
  stepTo(loopGain, walk, middle, walk.out[0]!, walk.out[1]!, halvings - 1)
  stepTo(loopGain, walk, omega, re, im, halvings - 1)
}

function keep(walk: Walk, omega: number, re: number, im: number): void {
  if (walk.length === walk.omega.length) grow(walk)
  walk.omega[walk.length] = omega
  walk.re[walk.length] = re
  walk.im[walk.length] = im
  walk.length++
}

function grow(walk: Walk): void {
  const larger = buffers(2 * walk.length)
  for (const key of ['omega', 're', 'im'] as const) {
    larger[key].set(walk[key])
    walk[key] = larger[key]
  }
}

/** Least |1 + T|: golden sections about every dip of the samples that could be the lowest. */
function closestApproach(loopGain: ResponseInto, walk: Walk): number {
  const { length, omega } = walk
  let least = Infinity
  for (let i = 0; i < length; i++) least = Math.min(least, distanceSquare(walk.re[i]!, walk.im[i]!))
  let best = least
  for (let i = 0; i < length; i++) {
    const here = distanceSquare(walk.re[i]!, walk.im[i]!)
    if (here > CANDIDATE * least) continue
    const low = Math.max(0, i - 1)
    const high = Math.min(length - 1, i + 1)
    if (here > distanceSquare(walk.re[low]!, walk.im[low]!) || here > distanceSquare(walk.re[high]!, walk.im[high]!))
      continue
    best = Math.min(best, leastBetween(loopGain, walk.out, Math.log(omega[low]!), Math.log(omega[high]!)))
  }
  return Math.sqrt(best)
}

/** |1 + T|² */
const distanceSquare = (re: number, im: number): number => (1 + re) * (1 + re) + im * im

function distanceSquareAt(loopGain: ResponseInto, out: Float64Array, logOmega: number): number {
  loopGain(Math.exp(logOmega), out)
  return distanceSquare(out[0]!, out[1]!)
}

/** |1 + T|² of a sampled dip, over the least one, up to which the true least may lie in it. */
const CANDIDATE = 1.7
const GOLDEN = (Math.sqrt(5) - 1) / 2
const SECTIONS = 10

function leastBetween(loopGain: ResponseInto, out: Float64Array, from: number, to: number): number {
  let low = from
  let high = to
  let left = high - GOLDEN * (high - low)
  let right = low + GOLDEN * (high - low)
  let atLeft = distanceSquareAt(loopGain, out, left)
  let atRight = distanceSquareAt(loopGain, out, right)
  for (let k = 0; k < SECTIONS; k++) {
    if (atLeft < atRight) {
      high = right
      right = left
      atRight = atLeft
      left = high - GOLDEN * (high - low)
      atLeft = distanceSquareAt(loopGain, out, left)
    } else {
      low = left
      left = right
      atLeft = atRight
      right = low + GOLDEN * (high - low)
      atRight = distanceSquareAt(loopGain, out, right)
    }
  }
  return Math.min(atLeft, atRight)
}

/**
 * The figures of `readMargins` for thousands of loops: a coarse grid that is refined only where the loop gain turns,
 * then a bracketed search for each crossing. No logarithm or angle is taken but at the crossings themselves.
 */
import type { LoopGain } from '../loop/margins'
import { argumentDeg, type Complex } from '../numeric/complex'
import { findRoot } from '../numeric/rootFinding'
import type { MarginSummary } from '../results'

export interface LoopShape {
  /** Hz, near which the curve bends sharply. */
  readonly landmarks: readonly number[]
  /** Poles of the open loop in the right half plane. */
  readonly unstablePoles: number
}

const PER_DECADE = 12
const LOWEST_SHARE = 1e-6 // of the switching frequency
/** A step that turns the loop gain by more than 45° is halved, this often at most. */
const LARGEST_TURN = Math.cos(Math.PI / 4)
const MOST_HALVINGS = 6
/** Relative width, in log ω, at which a crossing is found well enough. */
const CLOSE = 1e-9

/** rad/s, ascending up to half the switching frequency (Hz). */
export function marginGrid(switchingFrequency: number): Float64Array {
  const lowest = 2 * Math.PI * LOWEST_SHARE * switchingFrequency
  const steps = Math.ceil(-Math.log10(2 * LOWEST_SHARE) * PER_DECADE)
  const ratio = (2 * LOWEST_SHARE) ** (-1 / steps)
  return Float64Array.from({ length: steps + 1 }, (_, i) =>
    i === steps ? Math.PI * switchingFrequency : lowest * ratio ** i,
  )
}

interface Walk {
  readonly omega: number[]
  readonly re: number[]
  readonly im: number[]
}

export function fastMargins(loopGain: LoopGain, grid: Float64Array, shape: LoopShape): MarginSummary {
  const walk = walkLoop(loopGain, withLandmarks(grid, shape.landmarks))
  const { omega, re, im } = walk
  const phaseMargins: number[] = []
  let crossover: number | null = null
  let gainMargin: number | null = null
  let encirclements = 0
  const square = (i: number) => re[i]! * re[i]! + im[i]! * im[i]!
  for (let i = 1; i < omega.length; i++) {
    if (square(i - 1) > 1 !== square(i) > 1) {
      const at = rootBetween(omega[i - 1]!, omega[i]!, (w) => logSquare(loopGain(w)))
      crossover = at / (2 * Math.PI)
      phaseMargins.push(wrap(180 + argumentDeg(loopGain(at))))
    }
    if (im[i - 1]! < 0 !== im[i]! < 0 && (re[i - 1]! < 0 || re[i]! < 0)) {
      const { re: real } = loopGain(rootBetween(omega[i - 1]!, omega[i]!, (w) => loopGain(w).im))
      // Each passage left of −1 is half an encirclement there, and half at the negative frequencies.
      if (real < -1) encirclements += im[i]! < 0 ? -1 : 1
      else if (real < 0) gainMargin = Math.min(gainMargin ?? Infinity, -20 * Math.log10(-real))
    }
  }
  // A loop gain that is negative at standstill passes the axis there too, once for both halves.
  const passage = loopGain(0).re < -1 ? (im[0]! < 0 ? -1 : 1) : 0
  const encircled = 2 * encirclements + passage
  // Gain left at half the switching frequency meets its own sampled image there.
  const isStable = square(omega.length - 1) < 1 && shape.unstablePoles + encircled === 0
  return {
    crossover,
    phaseMargin: phaseMargins.length === 0 ? null : Math.min(...(isStable ? phaseMargins.map(Math.abs) : phaseMargins)),
    gainMargin,
    modulusMargin: closestApproach(loopGain, walk),
    isStable,
  }
}

const wrap = (degrees: number): number => degrees - 360 * Math.ceil((degrees - 180) / 360)
const logSquare = ({ re, im }: Complex): number => Math.log(re * re + im * im)

function rootBetween(low: number, high: number, f: (omega: number) => number): number {
  return Math.exp(findRoot((logOmega) => f(Math.exp(logOmega)), Math.log(low), Math.log(high), CLOSE))
}

/** The same places about a landmark as the exact reading takes. */
const AROUND = [0.97, 0.985, 0.993, 0.997, 1, 1.003, 1.007, 1.015, 1.03]

function withLandmarks(grid: Float64Array, landmarks: readonly number[]): Float64Array {
  if (landmarks.length === 0) return grid
  const extra = landmarks
    .flatMap((landmark) => AROUND.map((share) => 2 * Math.PI * landmark * share))
    .filter((omega) => omega > grid[0]! && omega < grid[grid.length - 1]!)
  return Float64Array.from([...grid, ...extra]).sort()
}

function walkLoop(loopGain: LoopGain, grid: Float64Array): Walk {
  const walk: Walk = { omega: [], re: [], im: [] }
  const keep = (omega: number, { re, im }: Complex) => {
    walk.omega.push(omega)
    walk.re.push(re)
    walk.im.push(im)
  }
  const step = (from: number, a: Complex, to: number, b: Complex, halvings: number): void => {
    const turn = a.re * b.re + a.im * b.im
    const sizes = Math.sqrt((a.re * a.re + a.im * a.im) * (b.re * b.re + b.im * b.im))
    if (turn < LARGEST_TURN * sizes && halvings > 0) {
      const middle = Math.sqrt(from * to)
      const gain = loopGain(middle)
      step(from, a, middle, gain, halvings - 1)
      step(middle, gain, to, b, halvings - 1)
    } else keep(to, b)
  }
  let before = loopGain(grid[0]!)
  keep(grid[0]!, before)
  for (let i = 1; i < grid.length; i++) {
    const here = loopGain(grid[i]!)
    step(grid[i - 1]!, before, grid[i]!, here, MOST_HALVINGS)
    before = here
  }
  return walk
}

/** Least |1 + T|: golden sections about every dip of the samples that could be the lowest. */
function closestApproach(loopGain: LoopGain, { omega, re, im }: Walk): number {
  const last = omega.length - 1
  const sampled = omega.map((_, i) => Math.hypot(1 + re[i]!, im[i]!))
  const least = Math.min(...sampled)
  let best = least
  for (let i = 0; i <= last; i++) {
    const low = Math.max(0, i - 1)
    const high = Math.min(last, i + 1)
    if (sampled[i]! > sampled[low]! || sampled[i]! > sampled[high]! || sampled[i]! > 1.3 * least) continue
    best = Math.min(best, leastBetween(loopGain, Math.log(omega[low]!), Math.log(omega[high]!)))
  }
  return best
}

const GOLDEN = (Math.sqrt(5) - 1) / 2
const SECTIONS = 14

function leastBetween(loopGain: LoopGain, from: number, to: number): number {
  const distance = (logOmega: number) => {
    const { re, im } = loopGain(Math.exp(logOmega))
    return Math.hypot(1 + re, im)
  }
  let low = from
  let high = to
  let left = high - GOLDEN * (high - low)
  let right = low + GOLDEN * (high - low)
  let atLeft = distance(left)
  let atRight = distance(right)
  for (let k = 0; k < SECTIONS; k++) {
    if (atLeft < atRight) {
      high = right
      right = left
      atRight = atLeft
      left = high - GOLDEN * (high - low)
      atLeft = distance(left)
    } else {
      low = left
      left = right
      atLeft = atRight
      right = low + GOLDEN * (high - low)
      atRight = distance(right)
    }
  }
  return Math.min(atLeft, atRight)
}

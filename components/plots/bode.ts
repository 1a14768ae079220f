/** Curves over frequency: their panels, axes, labels and readings. */
import { scaleLinear, scaleLog } from 'd3-scale'
import { line as lineOf, area as areaOf } from 'd3-shape'
import { overlaps, textWidth, type Box } from './layout'
import { wholeAxis, type LinearAxis } from './ticks'
import type { ResponseCurve } from '@/converters/results'

export interface BodeCurve {
  readonly key: string
  /** Beside the curve: switched, averaged, closed loop. */
  readonly label: string
  readonly response: ResponseCurve
  readonly isDashed?: boolean
  /** Drawn in quiet ink: it stands behind the curve that matters. */
  readonly isQuiet?: boolean
}

/** The lowest and the highest over the corners, at each frequency. */
export interface BodeBand {
  readonly low: ResponseCurve
  readonly high: ResponseCurve
}

/** What the gain is a ratio of decides how its axis is written. */
export type GainScale = 'dB' | 'Ω'

export interface CrossoverMark {
  readonly frequency: number // Hz
  readonly phaseMargin: number // degrees
}

export interface BodePlotProps {
  readonly title: string
  readonly fileName: string
  /** In words, with the figures that matter. */
  readonly summary: string
  readonly frequencies: readonly number[] // Hz
  readonly curves: readonly BodeCurve[]
  readonly band?: BodeBand | null
  readonly bandLabel?: string
  readonly gainTitle: string
  readonly gainScale?: GainScale
  readonly crossover?: CrossoverMark | null
  readonly height?: number
}

export type Quantity = 'gainDb' | 'phaseDeg'

export const LEFT = 50 // px, room for tick labels and axis title
export const RIGHT = 10
export const TOP = 8
export const BOTTOM = 38
export const BETWEEN = 16

export interface Panel {
  readonly quantity: Quantity
  readonly axis: LinearAxis
  readonly top: number
  readonly bottom: number
}

const GAIN_STEPS = [5, 10, 20, 40, 60, 80]
const OHM_STEPS = [20, 40]
const PHASE_STEPS = [15, 30, 45, 90, 180]
const DEEPEST = 140 // dB under the top of the axis; a notch further down says nothing more

export function panelsOf({ curves, band = null, gainScale = 'dB', crossover }: BodePlotProps, height: number): Panel[] {
  const inner = height - TOP - BOTTOM - BETWEEN
  const split = TOP + inner * 0.56
  const all = [...curves.map((curve) => curve.response), ...(band ? [band.low, band.high] : [])]
  const values = (quantity: Quantity) => all.flatMap((response) => response.map((point) => point[quantity]))
  const gains = values('gainDb')
  const top = Math.max(...gains.filter(Number.isFinite), 0)
  const gain = wholeAxis(
    gains.map((value) => Math.max(value, top - DEEPEST)),
    gainScale === 'Ω' ? OHM_STEPS : GAIN_STEPS,
    Math.max(4, Math.floor((split - TOP) / 30)),
  )
  // The axis of a loop's phase always shows −180°, from which the margin is read.
  const phase = wholeAxis(
    [...values('phaseDeg'), ...(crossover ? [-180] : [])],
    PHASE_STEPS,
    Math.max(4, Math.floor((height - split) / 32)),
  )
  return [
    { quantity: 'gainDb', axis: gain, top: TOP, bottom: split },
    { quantity: 'phaseDeg', axis: phase, top: split + BETWEEN, bottom: height - BOTTOM },
  ]
}

export function xScaleOf(frequencies: readonly number[], width: number) {
  return scaleLog()
    .domain([frequencies[0] ?? 10, frequencies.at(-1) ?? 1e6])
    .range([LEFT, width - RIGHT])
}
export type XScale = ReturnType<typeof xScaleOf>

export function yScaleOf(panel: Panel) {
  return scaleLinear().domain([panel.axis.low, panel.axis.high]).range([panel.bottom, panel.top])
}

export function curvePath(frequencies: readonly number[], response: ResponseCurve, panel: Panel, x: XScale): string {
  const y = yScaleOf(panel)
  const draw = lineOf<number>()
    .x((index) => x(frequencies[index]!))
    .y((index) => y(response[index]![panel.quantity]))
    .defined((index) => Number.isFinite(response[index]?.[panel.quantity]))
  return draw(frequencies.map((_, index) => index).filter((index) => index < response.length)) ?? ''
}

export function bandPath(frequencies: readonly number[], band: BodeBand, panel: Panel, x: XScale): string {
  const y = yScaleOf(panel)
  const draw = areaOf<number>()
    .x((index) => x(frequencies[index]!))
    .y0((index) => y(band.low[index]![panel.quantity]))
    .y1((index) => y(band.high[index]![panel.quantity]))
  return draw(frequencies.map((_, index) => index).filter((index) => index < band.low.length)) ?? ''
}

/** Envelope of several curves. */
export function bandOf(curves: readonly ResponseCurve[]): BodeBand | null {
  const first = curves[0]
  if (!first) return null
  const pick = (choose: (...values: number[]) => number): ResponseCurve =>
    first.map((_, index) => ({
      gainDb: choose(...curves.map((curve) => curve[index]?.gainDb ?? Number.NaN)),
      phaseDeg: choose(...curves.map((curve) => curve[index]?.phaseDeg ?? Number.NaN)),
    }))
  return { low: pick(Math.min), high: pick(Math.max) }
}

/** Index of the grid point nearest to a frequency, by ratio. */
export function nearestIndex(frequencies: readonly number[], frequency: number): number {
  let best = 0
  for (let index = 1; index < frequencies.length; index += 1) {
    const closer =
      Math.abs(Math.log(frequencies[index]! / frequency)) < Math.abs(Math.log(frequencies[best]! / frequency))
    if (closer) best = index
  }
  return best
}

/** A curve as it is drawn in a panel: px across and down, one of each for every point. */
interface Trace {
  readonly xs: readonly number[]
  readonly ys: readonly number[]
}

const NAME_HEIGHT = 17
const NAME_GAPS = [5, 14, 26, 42]
const NAME_STARTS = [0.04, 0.12, 0.22, 0.34, 0.46, 0.58, 0.7, 0.82] // shares of the panel's width

/** Names beside their curves where they cross no curve of the panel and none of `taken`; a name without room is left out. */
export function placeNames(
  curves: readonly BodeCurve[],
  frequencies: readonly number[],
  panel: Panel,
  x: XScale,
  taken: readonly Box[],
): { curve: BodeCurve; box: Box }[] {
  const y = yScaleOf(panel)
  const xs = frequencies.map((frequency) => x(frequency))
  const traces = curves.map(({ response }) => ({ xs, ys: response.map((point) => y(point[panel.quantity])) }))
  const frame = { left: LEFT + 4, right: x.range()[1]! - 4, top: panel.top + 2, bottom: panel.bottom - 2 }
  const placed: { curve: BodeCurve; box: Box }[] = []
  curves.forEach((curve, index) => {
    const covered = [...taken, ...placed.map(({ box }) => box)]
    const isFree = (box: Box) =>
      box.x >= frame.left &&
      box.x + box.width <= frame.right &&
      box.y >= frame.top &&
      box.y + box.height <= frame.bottom &&
      !covered.some((other) => overlaps(box, other)) &&
      traces.every((trace) => misses(trace, box))
    const box = besideTrace(traces[index]!, textWidth(curve.label, 13.4, 'condensed') + 4, frame).find(isFree)
    if (box) placed.push({ curve, box })
  })
  return placed
}

/** Places just above and just below a curve, the nearest first. */
function besideTrace(trace: Trace, width: number, frame: { readonly left: number; readonly right: number }): Box[] {
  return NAME_GAPS.flatMap((gap) =>
    NAME_STARTS.flatMap((share) => {
      const left = LEFT + share * (frame.right + 4 - LEFT)
      const own = heights(trace, left, left + width)
      if (own.length === 0) return []
      const size = { x: left, width, height: NAME_HEIGHT }
      return [
        { ...size, y: Math.min(...own) - gap - NAME_HEIGHT },
        { ...size, y: Math.max(...own) + gap },
      ]
    }),
  )
}

function heights({ xs, ys }: Trace, from: number, to: number): number[] {
  return ys.filter((_, index) => xs[index]! >= from - 4 && xs[index]! <= to + 4)
}

function misses(trace: Trace, box: Box): boolean {
  return heights(trace, box.x, box.x + box.width).every((at) => at < box.y - 2 || at > box.y + box.height + 2)
}

/** The curve between its points: straight over the logarithm of frequency. */
export function interpolate(curve: BodeCurve, frequencies: readonly number[], frequency: number) {
  const near = nearestIndex(frequencies, frequency)
  const from = Math.max(0, Math.min(frequencies.length - 2, frequency < frequencies[near]! ? near - 1 : near))
  const [a, b] = [curve.response[from], curve.response[from + 1]]
  if (!a || !b) return null
  const share = Math.log(frequency / frequencies[from]!) / Math.log(frequencies[from + 1]! / frequencies[from]!)
  return {
    gainDb: a.gainDb + share * (b.gainDb - a.gainDb),
    phaseDeg: a.phaseDeg + share * (b.phaseDeg - a.phaseDeg),
  }
}

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

/** Where along the curve its name fits without crossing any curve of the panel; null when it fits nowhere. */
export function labelPlace(
  label: string,
  curve: BodeCurve,
  others: readonly BodeCurve[],
  frequencies: readonly number[],
  panel: Panel,
  x: XScale,
  taken: readonly Box[],
): Box | null {
  const y = yScaleOf(panel)
  const size = { width: textWidth(label, 13.4, 'condensed') + 4, height: 17 }
  const heights = (of: BodeCurve, from: number, to: number) =>
    frequencies.flatMap((frequency, index) => {
      const at = x(frequency)
      const value = of.response[index]?.[panel.quantity]
      return at >= from - 4 && at <= to + 4 && value !== undefined ? [y(value)] : []
    })
  const free = (box: Box) =>
    box.x >= LEFT + 4 &&
    box.x + box.width <= x.range()[1]! - 4 &&
    box.y >= panel.top + 2 &&
    box.y + box.height <= panel.bottom - 2 &&
    taken.every((other) => !overlaps(box, other)) &&
    [curve, ...others].every((of) =>
      heights(of, box.x, box.x + box.width).every((at) => at < box.y - 2 || at > box.y + box.height + 2),
    )
  for (const gap of [5, 14, 26, 42]) {
    for (const share of [0.04, 0.12, 0.22, 0.34, 0.46, 0.58, 0.7, 0.82]) {
      const left = LEFT + share * (x.range()[1]! - LEFT)
      const own = heights(curve, left, left + size.width)
      if (own.length === 0) continue
      const above = { x: left, y: Math.min(...own) - gap - size.height, ...size }
      const below = { x: left, y: Math.max(...own) + gap, ...size }
      for (const box of [above, below]) if (free(box)) return box
    }
  }
  return null
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

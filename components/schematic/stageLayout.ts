/** Where the parts of a power stage stand. Lengths in px; the drawing widens with the width that there is. */
import { filterLadder, LADDERS, type Station } from './ladders'
import type { DesignDocument } from '@/converters/document'

/** The room that rungs of the ladder take, px. */
export interface Rungs {
  readonly along: number // along the rail, from one node to the next
  readonly narrow: number // the same for a part without lettering
  readonly first: number // the same for the first one, where the line's lettering and the gate's wire need room
  readonly across: number // from one upright to the next with nothing along the rail between
  readonly windings: number // ahead of windings that stand first
}

/** More room behind an upright, whose own lettering stands between. */
const AFTER_UPRIGHT = 24

/** Half the distance between the windings of a transformer. */
export const WINDING_GAP = 14

export interface Placed {
  readonly station: Station
  /** Middle of the part. */
  readonly x: number
  /** Where the upright behind it stands: lettering ends there. */
  readonly end: number
}

export interface Ladder {
  readonly placed: readonly Placed[]
  /** Where the last rung ends. */
  readonly end: number
}

/** Puts the rungs one behind another. */
export function placeLadder(stations: readonly Station[], rungs: Rungs, start: number, firstOfStage = 0): Ladder {
  const placed: Placed[] = []
  let x = start
  stations.forEach((station, index) => {
    const isFirst = index === firstOfStage
    const before = stations[index - 1]
    if (station.stands === 'along') {
      const width = alongWidth(station, rungs, { isFirst, stands: index === 0 ? 'first' : 'behind' })
      // The gate's wire leaves an upright to its left, and the middle of a part along the rail.
      const middle = isFirst && station.symbol === 'transistor' ? width - rungs.along / 2 : width / 2
      placed.push({ station, x: x + middle, end: x + width })
      x += width
    } else if (station.stands === 'across') {
      if (before?.stands !== 'along') x += rungs.across
      placed.push({ station, x, end: x })
    } else {
      const ahead = before ? rungs.windings + AFTER_UPRIGHT : rungs.windings
      x += (isFirst ? ahead : 0) + WINDING_GAP
      placed.push({ station, x, end: x + WINDING_GAP })
      x += WINDING_GAP
    }
  })
  return { placed, end: x }
}

function alongWidth(
  station: Station,
  rungs: Rungs,
  { isFirst, stands }: { readonly isFirst: boolean; readonly stands: 'first' | 'behind' },
): number {
  if (stands === 'first') return rungs.first
  if (isFirst) return rungs.first + (station.symbol === 'transistor' ? AFTER_UPRIGHT / 2 : 0)
  return station.isNarrow ? rungs.narrow : rungs.along
}

export interface StageLayout {
  readonly width: number
  readonly height: number
  readonly top: number // the rail that carries the power
  readonly bottom: number // the return
  readonly middle: number
  readonly source: number
  readonly rungs: readonly Placed[]
  readonly banks: readonly number[]
  readonly load: number
  /** Where the modulator's wire meets the switch. */
  readonly gate: { readonly x: number; readonly y: number }
  readonly control: {
    readonly top: number
    readonly bottom: number
    readonly left: number
    readonly middle: number
    readonly right: number
  }
}

const TOP = 58
const BOTTOM = 198
const SOURCE = 18
const RUNGS: Rungs = { along: 58, narrow: 42, first: 78, across: 56, windings: 84 }
const BANK_STEP = 70
const LOAD_STEP = 57
const AFTER_LOAD = 56
/** Height of a switch that stands below a winding, and of that winding. */
export const BELOW_WINDING = 166
export const UPPER_WINDING = 88

type Drawn = Pick<DesignDocument, 'topology' | 'inputFilter' | 'outputCapacitors'>

/** The narrowest drawing in which no label covers another. */
export function leastWidth(design: Drawn): number {
  return ladderOf(design).end + (design.outputCapacitors.length - 1) * BANK_STEP + LOAD_STEP + AFTER_LOAD
}

function ladderOf(design: Drawn): Ladder {
  const filter = filterLadder(design)
  return placeLadder([...filter, ...LADDERS[design.topology]], RUNGS, SOURCE, filter.length)
}

export function stageLayout(available: number, design: Drawn): StageLayout {
  const least = leastWidth(design)
  const width = Math.max(least, Math.min(available, least * 1.75))
  const at = (x: number) => (x * width) / least
  const { placed, end } = ladderOf(design)
  const rungs = placed.map((rung) => ({ ...rung, x: at(rung.x), end: at(rung.end) }))
  const banks = design.outputCapacitors.map((_, index) => end + index * BANK_STEP)
  const middle = (TOP + BOTTOM) / 2
  const gate = gateOf(rungs, middle)
  return {
    width,
    height: 314,
    top: TOP,
    bottom: BOTTOM,
    middle,
    source: at(SOURCE),
    rungs,
    banks: banks.map(at),
    load: at(banks.at(-1)! + LOAD_STEP),
    gate,
    // The gate's wire starts at the modulator, however far to the right the switch stands.
    control: { top: 240, bottom: 300, left: 8, middle: Math.max(width / 2, gate.x + 30), right: width - 22 },
  }
}

function gateOf(rungs: readonly Placed[], middle: number): StageLayout['gate'] {
  const rung = rungs.find(({ station }) => station.name === 'switch' || station.storesEnergy)!
  if (rung.station.storesEnergy) return { x: rung.x - WINDING_GAP - 20, y: BELOW_WINDING }
  return rung.station.stands === 'along' ? { x: rung.x, y: TOP + 20 } : { x: rung.x - 20, y: middle }
}

/** Where the parts of a power stage stand. Lengths in px; the drawing scales to the width that there is. */
import type { Topology } from '@/converters/document'

/** The topologies that are drawn here. */
export type DrawnTopology = Extract<Topology, 'buck' | 'boost'>

export interface StageLayout {
  readonly width: number
  readonly height: number
  readonly top: number // the rail that carries the power
  readonly bottom: number // the return
  readonly source: number
  readonly node: number // where switch, rectifier and inductor meet
  /** Middle of the part that lies along the rail before the node, and after it. */
  readonly beforeNode: number
  readonly afterNode: number
  readonly banks: readonly number[]
  readonly load: number
  readonly control: {
    readonly top: number
    readonly bottom: number
    readonly left: number
    readonly middle: number
    readonly right: number
  }
}

const BANK_STEP = 74
const BASE = { source: 18, beforeNode: 62, node: 103, afterNode: 143, bank: 184, load: 251, end: 308 } as const

/** The narrowest drawing in which no label covers another. */
export function leastWidth(banks: number): number {
  return BASE.end + (banks - 1) * BANK_STEP
}

export function stageLayout(available: number, banks: number): StageLayout {
  const least = leastWidth(banks)
  const width = Math.max(least, Math.min(available, least * 1.75))
  const stretch = width / least
  const at = (x: number) => x * stretch
  const shift = (banks - 1) * BANK_STEP
  return {
    width,
    height: 314,
    top: 58,
    bottom: 198,
    source: at(BASE.source),
    beforeNode: at(BASE.beforeNode),
    node: at(BASE.node),
    afterNode: at(BASE.afterNode),
    banks: Array.from({ length: banks }, (_, index) => at(BASE.bank + index * BANK_STEP)),
    load: at(BASE.load + shift),
    control: { top: 240, bottom: 300, left: 8, middle: width / 2, right: width - 22 },
  }
}

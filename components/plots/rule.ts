/** What stands on the frequency rule, and where. */
import { scaleLog } from 'd3-scale'
import { overlaps, spread, textWidth, type Box } from './layout'
import { lowestFrequency } from '@/hooks/frequencyGrid'

/** The part of a pole or zero that the rule needs. */
export interface RuleRoot {
  readonly frequency: number // Hz
  readonly halfPlane: 'left' | 'right' | 'axis'
  /** Written beside the mark where there is room. */
  readonly name?: string
}

export interface RuleMark {
  readonly kind: 'pole' | 'zero'
  readonly x: number
  readonly frequency: number
  readonly name: string
}

const GAP = 10 // px between neighbouring marks

export function ruleScale(switchingFrequency: number, left: number, right: number) {
  return scaleLog()
    .domain([lowestFrequency(switchingFrequency), switchingFrequency])
    .range([left, right])
}
export type RuleScale = ReturnType<typeof ruleScale>

/** Poles and zeros within the rule, moved apart where they would cover each other. */
export function ruleMarks(poles: readonly RuleRoot[], zeros: readonly RuleRoot[], scale: RuleScale): RuleMark[] {
  const [low, high] = scale.domain() as [number, number]
  const inside = (root: RuleRoot) => root.frequency >= low && root.frequency <= high
  const marks = [
    ...poles
      .filter(inside)
      .map((root) => ({ kind: 'pole' as const, frequency: root.frequency, name: root.name ?? '' })),
    ...zeros
      .filter(inside)
      .map((root) => ({ kind: 'zero' as const, frequency: root.frequency, name: root.name ?? '' })),
  ]
  const [left, right] = scale.range() as [number, number]
  const xs = spread(
    marks.map((mark) => scale(mark.frequency)),
    GAP,
  )
  // A group at an end of the rule is pushed inwards as a whole.
  const over = Math.max(0, ...xs.map((x) => x - (right - 5)))
  const under = Math.max(0, ...xs.map((x) => left + 5 - x))
  return marks.map((mark, index) => {
    const x = xs[index]!
    const isNearRight = x > right - 5 - GAP * marks.length
    const isNearLeft = x < left + 5 + GAP * marks.length
    return { ...mark, x: x - (isNearRight ? over : 0) + (isNearLeft ? under : 0) }
  })
}

/** Names to the left of the marks that they belong to, each group of equal neighbours once, where nothing is covered. */
export function ruleNames(marks: readonly RuleMark[], y: number, taken: readonly Box[]): { text: string; x: number }[] {
  const inOrder = [...marks].sort((a, b) => a.x - b.x)
  const firsts = inOrder.filter((mark, index) => mark.name !== '' && mark.name !== inOrder[index - 1]?.name)
  const boxes = [...taken, ...inOrder.map((mark) => ({ x: mark.x - 6, y: y - 6, width: 12, height: 12 }))]
  const names: { text: string; x: number }[] = []
  for (const { name, x } of firsts) {
    const width = textWidth(name, 13.4, 'condensed')
    const box = { x: x - 10 - width, y: y - 7, width, height: 14 }
    if (box.x < 0 || boxes.some((other) => overlaps(other, box))) continue
    boxes.push(box)
    names.push({ text: name, x: x - 10 })
  }
  return names
}

/** One step of the keyboard: 1/48 of a decade. */
export const STEP = 10 ** (1 / 48)

/** The frequency that a key asks for, or null for a key that means nothing here. */
export function afterKey(key: string, frequency: number, low: number, high: number): number | null {
  const keys: Readonly<Record<string, number>> = {
    ArrowRight: frequency * STEP,
    ArrowUp: frequency * STEP,
    ArrowLeft: frequency / STEP,
    ArrowDown: frequency / STEP,
    PageUp: frequency * STEP ** 12,
    PageDown: frequency / STEP ** 12,
    Home: low,
    End: high,
  }
  const asked = keys[key]
  return asked === undefined ? null : Math.min(high, Math.max(low, asked))
}

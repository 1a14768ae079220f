import { G } from 'react-native-svg'
import { Lines } from './Lines'
import { Capacitor, Resistor } from './symbols'
import type { CompensatorPart } from '@/converters/document'
import { formatEntry } from '@/hooks/draft/entries'

export type NetworkParts = Partial<Record<CompensatorPart, number | null>>

export interface Ink {
  readonly color: string
  readonly ground: string
  readonly value: string
}

export function partText(name: CompensatorPart, value: number): string {
  return formatEntry(value, name.startsWith('R') ? 'Ω' : 'F')
}

export interface NetworkPartProps {
  readonly name: CompensatorPart
  readonly parts: NetworkParts
  readonly x: number
  readonly y: number
  readonly ink: Ink
  readonly isVertical?: boolean
  /** Where the lettering stands; `beside` on one line. */
  readonly side?: 'above' | 'below' | 'right' | 'beside'
}

/** One part with its name and value; a part that is not fitted leaves its wire open. */
export function NetworkPart({ name, parts, x, y, ink, isVertical, side = 'above' }: NetworkPartProps) {
  const value = parts[name]
  const Symbol = name.startsWith('R') ? Resistor : Capacitor
  const words = [name, value ? partText(name, value) : 'not fitted']
  const lines = side === 'beside' ? [words.join(' ')] : words
  const at = { above: { x, y: y - 29 }, below: { x, y: y + 22 }, right: { x: x + 15, y }, beside: { x: x + 15, y } }[
    side
  ]
  return (
    <G>
      <Symbol x={x} y={y} isVertical={isVertical ?? false} color={ink.color} ground={ink.ground} />
      <Lines {...at} lines={lines} color={ink.value} isCentred={side === 'above' || side === 'below'} />
    </G>
  )
}

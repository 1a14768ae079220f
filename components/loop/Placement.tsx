import { useState } from 'react'
import { StyleSheet, View } from 'react-native'
import { Button } from '@/components/ui/Button'
import { Field } from '@/components/ui/Field'
import { Fields } from '@/components/design/Fields'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import type { DesignDocument } from '@/converters/document'
import { parseQuantity } from '@/converters/quantities'
import { useProposals } from '@/hooks/useProposals'
import { formatEntry } from '@/hooks/draft/entries'

interface Places {
  readonly zeros: readonly [string, string]
  readonly poles: readonly [string, string]
}

export interface Placement {
  readonly places: Places | null
  /** Sent with the request; null while placing by hand is off or an entry cannot be read. */
  readonly value: { readonly zeros: number[]; readonly poles: number[] } | null
  readonly begin: () => void
  readonly end: () => void
  readonly set: (kind: 'zeros' | 'poles', index: 0 | 1, text: string) => void
}

/** Zeros and poles placed by hand, as text until they can be read. Begins with those of the best proposal. */
export function usePlacement(design: DesignDocument): Placement {
  const { data } = useProposals()
  const [places, setPlaces] = useState<Places | null>(null)
  const begin = () => {
    const best = data?.proposals[0]
    const highest = design.switchingFrequency
    const frequencies = (roots: readonly { frequency: number }[] | undefined, fallback: number): [string, string] => {
      const inside = (roots ?? [])
        .map((root) => root.frequency)
        .filter((hertz) => hertz > 20 && hertz < 4 * highest)
        .sort((a, b) => a - b)
      const [first = fallback, second = first] = inside
      return [shown(first), shown(second)]
    }
    setPlaces({ zeros: frequencies(best?.zeros, highest / 100), poles: frequencies(best?.poles, highest / 2) })
  }
  return {
    places,
    value: places && readPlaces(places),
    begin,
    end: () => setPlaces(null),
    set: (kind, index, text) =>
      setPlaces((before) => {
        if (!before) return before
        const [first, second] = before[kind]
        return { ...before, [kind]: index === 0 ? [text, second] : [first, text] }
      }),
  }
}

const shown = (hertz: number) => formatEntry(Number(hertz.toPrecision(3)), 'Hz')

/** The second zero and pole may stay empty: then a type II network is placed. */
function readPlaces({ zeros, poles }: Places): Placement['value'] {
  const read = (texts: readonly string[]) =>
    texts.filter((text) => text.trim() !== '').map((text) => parseQuantity(text, 'Hz'))
  const values = [read(zeros), read(poles)].map((list) =>
    list.flatMap((entry) => (entry.kind === 'value' && entry.value > 0 ? [entry.value] : [])),
  )
  const isWhole = values[0]!.length === read(zeros).length && values[1]!.length === read(poles).length
  return isWhole ? { zeros: values[0]!, poles: values[1]! } : null
}

function problemOf(text: string): string | undefined {
  if (text.trim() === '') return undefined
  const entry = parseQuantity(text, 'Hz')
  if (entry.kind === 'problem') return entry.message
  return entry.value > 0 ? undefined : 'Must be greater than zero.'
}

const NAMES = [
  ['zeros', 0, 'First zero'],
  ['zeros', 1, 'Second zero'],
  ['poles', 0, 'First pole'],
  ['poles', 1, 'Second pole'],
] as const

export function PlacementFields({ placement }: { readonly placement: Placement }) {
  const { places, begin, end, set } = placement
  if (!places) {
    return (
      <View style={styles.left}>
        <Button kind="quiet" label="Place zeros and poles by hand" onPress={begin} />
      </View>
    )
  }
  return (
    <View role="group" aria-label="Zeros and poles placed by hand" style={styles.group}>
      <Text variant="small" tone="quiet">
        The integrator comes with them. Leave the second ones empty for a type II network.
      </Text>
      <Fields>
        {NAMES.map(([kind, index, label]) => (
          <Field
            key={label}
            label={label}
            value={places[kind][index]}
            error={problemOf(places[kind][index])}
            onChangeText={(text) => set(kind, index, text)}
          />
        ))}
      </Fields>
      <View style={styles.left}>
        <Button kind="quiet" label="Leave the placing to the program" onPress={end} />
      </View>
    </View>
  )
}

const styles = StyleSheet.create({ left: { alignSelf: 'flex-start', marginLeft: -space.sm }, group: { gap: space.sm } })

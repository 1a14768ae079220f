import { StyleSheet, View } from 'react-native'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { useTheme } from '@/hooks/useTheme'

export interface BarListProps {
  readonly label: string
  readonly items: readonly {
    readonly key: string
    readonly name: string
    /** As it is written. */
    readonly text: string
    /** Length of the bar; its sign decides on the side. */
    readonly value: number
  }[]
  /** Bars to both sides of a middle line. */
  readonly isSigned?: boolean
}

/** What counts most comes first, each with its figure and a bar beside the others. */
export function BarList({ label, items, isSigned = false }: BarListProps) {
  const theme = useTheme()
  const greatest = Math.max(...items.map(({ value }) => Math.abs(value)), 1e-12)
  return (
    <View role="list" aria-label={label} style={styles.list}>
      {items.map(({ key, name, text, value }) => {
        const share = (Math.abs(value) / greatest) * (isSigned ? 50 : 100)
        const from = isSigned ? (value < 0 ? 50 - share : 50) : 0
        return (
          <View key={key} role="listitem" style={styles.item}>
            <View style={styles.words}>
              <View style={styles.name}>
                <Text variant="small">{name}</Text>
              </View>
              <Text variant="smallValue">{text}</Text>
            </View>
            <View style={[styles.track, { backgroundColor: theme.paper }]}>
              <View
                style={[
                  styles.bar,
                  {
                    left: `${from}%`,
                    width: `${share}%`,
                    backgroundColor: value < 0 ? theme.accent : theme.gain,
                  },
                ]}
              />
              {isSigned ? <View style={[styles.middle, { backgroundColor: theme.edge }]} /> : null}
            </View>
          </View>
        )
      })}
    </View>
  )
}

const styles = StyleSheet.create({
  list: { gap: space.md },
  item: { gap: space.xs },
  words: { flexDirection: 'row', justifyContent: 'space-between', gap: space.md },
  name: { flexShrink: 1 },
  track: { height: 8, borderRadius: 4, overflow: 'hidden' },
  bar: { position: 'absolute', top: 0, bottom: 0 },
  middle: { position: 'absolute', top: 0, bottom: 0, left: '50%', width: 1 },
})

import { Pressable, StyleSheet, View } from 'react-native'
import { TopologyGlyph } from './TopologyGlyph'
import { TOPOLOGY_NAMES } from '@/components/design/summary'
import type { DrawnTopology } from '@/components/schematic/stageLayout'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { TOPOLOGIES } from '@/converters/document'
import { useTheme } from '@/hooks/useTheme'

const CARDS: readonly { topology: DrawnTopology; text: string }[] = [
  { topology: 'buck', text: 'Steps down. The output filter sets the plant.' },
  { topology: 'boost', text: 'Steps up. A right-half-plane zero limits the loop.' },
]
const LATER = TOPOLOGIES.filter((topology) => !CARDS.some((card) => card.topology === topology))

export interface TopologyCardsProps {
  readonly value: DrawnTopology
  readonly onChange: (topology: DrawnTopology) => void
}

/** The topologies that can be computed, drawn; those that cannot yet are named as such. */
export function TopologyCards({ value, onChange }: TopologyCardsProps) {
  const theme = useTheme()
  return (
    <View style={styles.list}>
      <View role="radiogroup" aria-label="Topology" style={styles.row}>
        {CARDS.map(({ topology, text }) => {
          const isChosen = topology === value
          return (
            <Pressable
              key={topology}
              role="radio"
              aria-checked={isChosen}
              aria-label={`${TOPOLOGY_NAMES[topology]}. ${text}`}
              onPress={() => onChange(topology)}
              style={[
                styles.card,
                { backgroundColor: theme.sheet, borderColor: isChosen ? theme.accent : theme.edge },
                isChosen && styles.chosen,
              ]}
            >
              <TopologyGlyph topology={topology} color={theme.ink} ground={theme.sheet} />
              <Text variant="strong">{`${TOPOLOGY_NAMES[topology]}${isChosen ? ' ✓' : ''}`}</Text>
              <Text variant="small" tone="quiet">
                {text}
              </Text>
            </Pressable>
          )
        })}
      </View>
      <Text variant="small" tone="quiet">
        {`Not available yet: ${LATER.map((topology) => TOPOLOGY_NAMES[topology].toLowerCase().replace('sepic', 'SEPIC').replace('ćuk', 'Ćuk')).join(', ')}.`}
      </Text>
    </View>
  )
}

const styles = StyleSheet.create({
  list: { gap: space.sm },
  row: { flexDirection: 'row', flexWrap: 'wrap', gap: space.md },
  card: { flexGrow: 1, flexBasis: 220, borderWidth: 1, borderRadius: 8, padding: space.md, gap: 2 },
  chosen: { borderWidth: 2, padding: space.md - 1 },
})

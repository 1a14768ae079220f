import { Pressable, StyleSheet, View } from 'react-native'
import { TopologyGlyph } from './TopologyGlyph'
import { TOPOLOGY_NAMES } from '@/components/design/summary'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { TOPOLOGIES, type Topology } from '@/converters/document'
import { useTheme } from '@/hooks/useTheme'

const TEXTS: Readonly<Record<Topology, string>> = {
  buck: 'Steps down. The output filter sets the plant.',
  boost: 'Steps up. A right-half-plane zero limits the loop.',
  'buck-boost': 'Inverts, up or down. A right-half-plane zero limits the loop.',
  flyback: 'Isolated, up or down, for small power. Energy is stored in the transformer.',
  forward: 'Isolated, a buck behind a transformer.',
  sepic: 'Up or down without inverting. Two inductors and a coupling capacitor.',
  cuk: 'Inverts with smooth currents at both ends. Two inductors and a coupling capacitor.',
}

export interface TopologyCardsProps {
  readonly value: Topology
  readonly onChange: (topology: Topology) => void
}

/** Every topology, drawn. */
export function TopologyCards({ value, onChange }: TopologyCardsProps) {
  const theme = useTheme()
  return (
    <View role="radiogroup" aria-label="Topology" style={styles.row}>
      {TOPOLOGIES.map((topology) => {
        const isChosen = topology === value
        return (
          <Pressable
            key={topology}
            role="radio"
            aria-checked={isChosen}
            aria-label={`${TOPOLOGY_NAMES[topology]}. ${TEXTS[topology]}`}
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
              {TEXTS[topology]}
            </Text>
          </Pressable>
        )
      })}
    </View>
  )
}

const styles = StyleSheet.create({
  row: { flexDirection: 'row', flexWrap: 'wrap', gap: space.md },
  card: { flexGrow: 1, flexBasis: 220, maxWidth: 420, borderWidth: 1, borderRadius: 8, padding: space.md, gap: 2 },
  chosen: { borderWidth: 2, padding: space.md - 1 },
})

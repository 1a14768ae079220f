import { StyleSheet, View } from 'react-native'
import { figure, ratio } from '@/components/format'
import { upperHalf } from '@/components/plots/sPlane'
import { meaning, ROLE_NAMES } from '@/components/roots'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import type { Root } from '@/converters/results'
import { useTheme } from '@/hooks/useTheme'

export interface RootsTableProps {
  readonly label: string
  readonly poles: readonly Root[]
  readonly zeros: readonly Root[]
}

/** Poles and zeros, slowest first, each with what it means in time; a pair is one line. */
export function RootsTable({ label, poles, zeros }: RootsTableProps) {
  const entries = [
    ...upperHalf(poles).map((root) => ({ root, kind: 'pole' as const })),
    ...upperHalf(zeros).map((root) => ({ root, kind: 'zero' as const })),
  ].sort((a, b) => a.root.frequency - b.root.frequency)
  return (
    <View role="list" aria-label={label}>
      {entries.map((entry, index) => (
        <RootRow key={index} {...entry} isFirst={index === 0} />
      ))}
    </View>
  )
}

function RootRow({ root, kind, isFirst }: { root: Root; kind: 'pole' | 'zero'; isFirst: boolean }) {
  const theme = useTheme()
  const isPair = root.imaginary > 0
  const mark = (kind === 'pole' ? '×' : '○').repeat(isPair ? 2 : 1)
  const isWrong = root.halfPlane === 'right'
  return (
    <View role="listitem" style={[styles.row, !isFirst && { borderTopWidth: 1, borderTopColor: theme.rule }]}>
      <View style={styles.words}>
        <Text variant="strong">{`${mark} ${capital(ROLE_NAMES[root.role])} ${isPair ? `${kind} pair` : kind}`}</Text>
        <Text variant="small" tone={isWrong ? 'short' : 'quiet'}>
          {meaning(root, kind)}
        </Text>
      </View>
      <View style={styles.figures}>
        <Text variant="value" lines={1}>
          {figure(root.frequency, 'Hz')}
        </Text>
        {isPair ? (
          <Text variant="smallValue" tone="quiet" lines={1}>
            {`ζ ${ratio(root.dampingRatio)}${root.quality === null ? '' : `  Q ${ratio(root.quality)}`}`}
          </Text>
        ) : null}
      </View>
    </View>
  )
}

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1)

const styles = StyleSheet.create({
  row: { flexDirection: 'row', gap: space.md, paddingVertical: space.sm, alignItems: 'baseline' },
  words: { flex: 1, minWidth: 0 },
  figures: { alignItems: 'flex-end' },
})

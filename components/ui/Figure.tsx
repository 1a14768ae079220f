import { StyleSheet, View } from 'react-native'
import { Text } from './Text'
import { space } from '@/constants/theme'

export type Verdict = 'holds' | 'tight' | 'short'

/** The word's mark: the verdict is never told by colour alone. */
const MARKS: Readonly<Record<Verdict, string>> = { holds: '✓', tight: '▲', short: '✕' }

export interface FigureProps {
  readonly label: string
  readonly value: string
  /** The value is a word, not a number. */
  readonly isWord?: boolean
  readonly verdict?: Verdict | undefined
  /** Below the figure, in a few words: under which conditions, or against which aim. */
  readonly note?: string | undefined
}

/** One figure with its unit, and whether it holds. */
export function Figure({ label, value, isWord, verdict, note }: FigureProps) {
  return (
    <View style={styles.figure} role="group" aria-label={label}>
      <Text variant="label" tone="quiet">
        {label}
      </Text>
      <View style={styles.line}>
        <Text variant={isWord ? 'heading' : 'figure'} lines={1} style={isWord && styles.word}>
          {value}
        </Text>
        {verdict ? <VerdictWord verdict={verdict} /> : null}
      </View>
      {note ? (
        <Text variant="small" tone="quiet">
          {note}
        </Text>
      ) : null}
    </View>
  )
}

export function VerdictWord({ verdict }: { readonly verdict: Verdict }) {
  return (
    <Text variant="labelStrong" tone={verdict} lines={1}>
      {`${MARKS[verdict]} ${verdict}`}
    </Text>
  )
}

const styles = StyleSheet.create({
  figure: { gap: 2, paddingVertical: space.xs },
  word: { lineHeight: 28 },
  line: { flexDirection: 'row', alignItems: 'baseline', flexWrap: 'nowrap', gap: space.sm },
})

import { StyleSheet, View } from 'react-native'
import type { StatisticalRun } from './useStatisticalRun'
import { count } from './words'
import { Button } from '@/components/ui/Button'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { isUnderWay } from '@/hooks/queries/spreadRuns'
import { useTheme } from '@/hooks/useTheme'

/** How far a run is, in samples, and the way to end it. */
export function RunProgress({ statistics }: { readonly statistics: StatisticalRun }) {
  const theme = useTheme()
  const { run, isCancelling, cancel } = statistics
  const current = run && isUnderWay(run) ? run : undefined
  const { done, total } = current?.evaluations ?? { done: 0, total: 0 }
  const share = current?.progress ?? 0
  const words =
    current?.state === 'running' ? `${count(done)} of ${count(total)} samples` : 'Waiting for its turn to begin'
  return (
    <View style={styles.all}>
      <View
        role="progressbar"
        aria-label="Progress of the run"
        aria-valuemin={0}
        aria-valuemax={100}
        aria-valuenow={Math.floor(100 * share)}
        aria-valuetext={words}
        style={[styles.track, { backgroundColor: theme.paper, borderColor: theme.edge }]}
      >
        <View style={[styles.bar, { width: `${100 * share}%`, backgroundColor: theme.accent }]} />
      </View>
      <View style={styles.row}>
        <View style={styles.words}>
          <Text variant="smallValue">{words}</Text>
        </View>
        <Button label="Cancel" spoken="Cancel the run" isDisabled={!current || isCancelling} onPress={cancel} />
      </View>
      <Text variant="small" tone="quiet">
        The run goes on when you leave this page; its result waits here.
      </Text>
    </View>
  )
}

const styles = StyleSheet.create({
  all: { gap: space.sm },
  track: { height: 14, borderWidth: 1, borderRadius: 7, overflow: 'hidden' },
  bar: { height: '100%' },
  row: { flexDirection: 'row', alignItems: 'center', gap: space.md },
  words: { flexGrow: 1, flexShrink: 1 },
})

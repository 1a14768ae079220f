import { StyleSheet, View } from 'react-native'
import { figure } from '@/components/format'
import { TargetFields } from '@/components/stage/TargetFields'
import { Card } from '@/components/ui/Card'
import { Notice } from '@/components/ui/Notice'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import type { Bound, CompensatorProposals } from '@/converters/results'
import { useTheme } from '@/hooks/useTheme'

/** Where the crossover may sit, what bounds it on each side, and what is suggested. */
export function WindowCard({ proposals }: { readonly proposals: CompensatorProposals }) {
  const { window, suggestion, refusal } = proposals
  const isOpen = window.lower < window.upper
  return (
    <Card title="Room for the crossover">
      {isOpen ? (
        <Text variant="figure">{`${figure(window.lower, 'Hz')} to ${figure(window.upper, 'Hz')}`}</Text>
      ) : (
        <Notice kind="fault" title="There is no room">
          {`The lower bound, ${figure(window.lower, 'Hz')}, lies above the upper one, ${figure(window.upper, 'Hz')}.`}
        </Notice>
      )}
      <View role="list" aria-label="Bounds of the crossover">
        {[...window.bounds]
          .sort((a, b) => a.side.localeCompare(b.side) || order(a) - order(b))
          .map((bound, index) => (
            <BoundRow
              key={index}
              bound={bound}
              isBinding={bound.frequency === (bound.side === 'lower' ? window.lower : window.upper)}
            />
          ))}
      </View>
      {suggestion ? (
        <View style={styles.suggestion}>
          <Text variant="strong">
            {`Suggested: ${figure(suggestion.crossover, 'Hz')}, type ${suggestion.type}, phase boost ${figure(suggestion.phaseBoost, '°')}`}
          </Text>
          {suggestion.reasons.map((reason) => (
            <Text key={reason} variant="small" tone="quiet">
              {reason}
            </Text>
          ))}
        </View>
      ) : null}
      {refusal ? (
        <Notice kind="fault" title="No network can do this" isLive>
          {refusal}
        </Notice>
      ) : null}
      <TargetFields />
    </Card>
  )
}

/** The tightest bound of each side first. */
const order = (bound: Bound) => (bound.side === 'lower' ? -bound.frequency : bound.frequency)

function BoundRow({ bound, isBinding }: { readonly bound: Bound; readonly isBinding: boolean }) {
  const theme = useTheme()
  return (
    <View role="listitem" style={[styles.bound, { borderTopColor: theme.rule }]}>
      <Text variant="smallValue" lines={1} style={styles.frequency}>
        {`${bound.side === 'lower' ? '≥' : '≤'} ${figure(bound.frequency, 'Hz')}`}
      </Text>
      <View style={styles.words}>
        <Text variant="small" tone={isBinding ? 'ink' : 'quiet'}>
          {bound.text}
        </Text>
        <Text variant="small" tone="quiet">
          {`${isBinding ? 'This one decides. ' : ''}Source: ${bound.source}`}
        </Text>
      </View>
    </View>
  )
}

const styles = StyleSheet.create({
  bound: { flexDirection: 'row', gap: space.md, paddingVertical: space.sm, borderTopWidth: 1 },
  frequency: { width: 92 },
  words: { flex: 1, minWidth: 0 },
  suggestion: { gap: space.xs },
})

import { useRouter } from 'expo-router'
import { StyleSheet, View } from 'react-native'
import { Button } from '@/components/ui/Button'
import { Card } from '@/components/ui/Card'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { formatQuantity, UNITS, type Unit } from '@/converters/quantities'
import { draftStore } from '@/hooks/draft/store'
import { fieldSpec, isEntry } from '@/hooks/draft/fields'
import { pathOf } from '@/hooks/api'
import { formatEntry } from '@/hooks/draft/entries'
import { useTheme } from '@/hooks/useTheme'
import type { StageProposal } from '@/server/contract/stageProposals'

/** What the quick start proposes, each value with its reason; nothing replaces the open design before it is taken. */
export function ProposedStage({ proposal }: { readonly proposal: StageProposal }) {
  const theme = useTheme()
  const router = useRouter()
  const take = () => {
    draftStore.open(proposal.design)
    router.push('/design/stage')
  }
  return (
    <Card title="Proposed power stage">
      <View role="list" aria-label="Proposed values">
        {byReason(proposal.choices).map(({ reason, choices }, index) => (
          <View
            key={reason}
            role="listitem"
            style={[styles.row, index > 0 && { borderTopWidth: 1, borderTopColor: theme.rule }]}
          >
            {choices.map(({ field, value, unit }) => (
              <View key={field} style={styles.line}>
                <Text variant="strong">{nameOf(field)}</Text>
                <Text variant="value">{written(value, unit)}</Text>
              </View>
            ))}
            <Text variant="small" tone="quiet">
              {reason}
            </Text>
          </View>
        ))}
      </View>
      <View style={styles.left}>
        <Button kind="primary" label="Begin with this stage" onPress={take} />
      </View>
    </Card>
  )
}

type StageChoices = StageProposal['choices']

/** Values that were chosen together stand together, with their reason once. */
function byReason(choices: StageChoices): { reason: string; choices: StageChoices }[] {
  const reasons = [...new Set(choices.map((choice) => choice.reason))]
  return reasons.map((reason) => ({ reason, choices: choices.filter((choice) => choice.reason === reason) }))
}

function nameOf(field: string): string {
  const path = pathOf(field)
  return isEntry(path) ? fieldSpec(path).label : field
}

function written(value: number, unit: string): string {
  const known = UNITS.find((candidate): candidate is Unit => candidate === unit)
  return known === undefined ? `${formatQuantity(value, '')} ${unit}` : formatEntry(value, known)
}

const styles = StyleSheet.create({
  row: { paddingVertical: space.sm, gap: 2 },
  line: { flexDirection: 'row', justifyContent: 'space-between', gap: space.md, flexWrap: 'wrap' },
  left: { alignSelf: 'flex-start' },
})

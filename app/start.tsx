import { useState } from 'react'
import { StyleSheet, View } from 'react-native'
import { ProposedStage } from '@/components/start/ProposedStage'
import { QuickStartForm } from '@/components/start/QuickStartForm'
import { SampleCards } from '@/components/start/SampleCards'
import { LinkButton } from '@/components/ui/Button'
import { Card } from '@/components/ui/Card'
import { Page } from '@/components/ui/Page'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { useStoredDraft } from '@/hooks/draft/useDraft'
import { useLayout } from '@/hooks/useLayout'
import type { StageProposal } from '@/server/contract/stageProposals'

export default function StartScreen() {
  const { isWide } = useLayout()
  const hasDraft = useStoredDraft().kind === 'draft'
  const [proposal, setProposal] = useState<StageProposal | null>(null)
  return (
    <Page
      title="Start"
      actions={hasDraft ? <LinkButton label="Back to the open design" kind="quiet" href="/design/stage" /> : null}
    >
      <View style={styles.words}>
        <Text variant="title" heading={1}>
          Start a design
        </Text>
        <Text tone="quiet">
          Give the figures that you have on the first day. Inductor, capacitors and modulator are proposed with the
          reason for each, and every value can be changed afterwards.
        </Text>
      </View>
      <View style={isWide ? styles.wide : styles.narrow}>
        <View style={styles.form}>
          <Card title="Your rail">
            <QuickStartForm onProposal={setProposal} />
          </Card>
        </View>
        <View style={isWide ? styles.side : styles.below}>
          {proposal ? <ProposedStage proposal={proposal} /> : null}
          <View style={styles.samples}>
            <Text variant="heading" heading={2}>
              Worked samples
            </Text>
            <Text variant="small" tone="quiet">
              Rails of an invented company that makes harbour water-level loggers.
            </Text>
            <SampleCards />
            <View style={styles.left}>
              <LinkButton label="Open a design document" kind="quiet" icon="arrow" href="/open" />
            </View>
          </View>
        </View>
      </View>
    </Page>
  )
}

const styles = StyleSheet.create({
  words: { gap: space.sm, maxWidth: 720 },
  wide: { flexDirection: 'row', gap: space.xl, alignItems: 'flex-start' },
  narrow: { gap: space.lg },
  form: { flexGrow: 1, flexShrink: 1, minWidth: 0 },
  side: { width: '44%', gap: space.xl },
  below: { gap: space.xl },
  samples: { gap: space.md },
  left: { alignSelf: 'flex-start', marginLeft: -space.sm },
})

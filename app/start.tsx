import { useState } from 'react'
import { StyleSheet, View } from 'react-native'
import { CONTROL_SCHEMES } from '@/components/stage/controlSchemes'
import { ProposedStage } from '@/components/start/ProposedStage'
import { QuickStartForm } from '@/components/start/QuickStartForm'
import { SampleCards } from '@/components/start/SampleCards'
import { isWorked, type ControlScheme } from '@/components/start/startingDesigns'
import { TopologyCards } from '@/components/start/TopologyCards'
import { WorkedStart } from '@/components/start/WorkedStart'
import { LinkButton } from '@/components/ui/Button'
import { Card } from '@/components/ui/Card'
import { Choice } from '@/components/ui/Choice'
import { Page } from '@/components/ui/Page'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import type { Topology } from '@/converters/document'
import { useStoredDraft } from '@/hooks/draft/useDraft'
import { useLayout } from '@/hooks/useLayout'
import type { StageProposal } from '@/server/contract/stageProposals'

export default function StartScreen() {
  const { isWide } = useLayout()
  const hasDraft = useStoredDraft().kind === 'draft'
  const [topology, setTopology] = useState<Topology>('buck')
  const [controlScheme, setControlScheme] = useState<ControlScheme>('voltage-mode')
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
          Choose the circuit and how it is controlled. For a buck or a boost, inductor, capacitors and modulator are
          proposed from the figures that you have on the first day, with the reason for each; the others begin with a
          worked stage. Every value can be changed afterwards.
        </Text>
      </View>
      <View style={isWide ? styles.wide : styles.narrow}>
        <View style={styles.form}>
          <Card title="Circuit">
            <TopologyCards
              value={topology}
              onChange={(next) => {
                setTopology(next)
                setProposal(null)
              }}
            />
            <Choice
              label="Control"
              value={controlScheme}
              options={CONTROL_SCHEMES}
              onChange={(next) => {
                setControlScheme(next)
                setProposal(null)
              }}
            />
          </Card>
          {isWorked(topology) ? (
            <Card title="A worked stage">
              <WorkedStart topology={topology} controlScheme={controlScheme} />
            </Card>
          ) : (
            <Card title="Your rail">
              <QuickStartForm topology={topology} controlScheme={controlScheme} onProposal={setProposal} />
            </Card>
          )}
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
  form: { flexGrow: 1, flexShrink: 1, minWidth: 0, gap: space.lg },
  side: { width: '44%', gap: space.xl },
  below: { gap: space.xl },
  samples: { gap: space.md },
  left: { alignSelf: 'flex-start', marginLeft: -space.sm },
})

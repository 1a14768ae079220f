import { StyleSheet, View } from 'react-native'
import { HeroRule } from '@/components/start/HeroRule'
import { SampleCards } from '@/components/start/SampleCards'
import { LinkButton } from '@/components/ui/Button'
import { Page } from '@/components/ui/Page'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { useStoredDraft } from '@/hooks/draft/useDraft'
import { useLayout } from '@/hooks/useLayout'
import { useTheme } from '@/hooks/useTheme'

const STEPS = [
  {
    title: 'Draw the stage',
    text: 'Topology, parts and parasitics, typed the way you write them. The schematic follows.',
  },
  {
    title: 'See what limits the loop',
    text: 'Poles and zeros with what each means in time, from an averaged model and from the switched circuit itself.',
  },
  {
    title: 'Close it with parts you can buy',
    text: 'A network in preferred values, chosen for the worst corner of line and load, with the reasons and what is still short.',
  },
] as const

export default function LandingScreen() {
  const { isWide } = useLayout()
  const hasDraft = useStoredDraft().kind === 'draft'
  return (
    <Page
      title="Feedback loops of switching power supplies"
      actions={hasDraft ? <LinkButton label="Open design" href="/design/stage" /> : null}
    >
      <View style={styles.hero}>
        <Text variant="display" heading={1} style={isWide ? styles.display : styles.phoneDisplay}>
          The loop of your converter, closed with parts you can buy.
        </Text>
        <Text variant="lead" tone="quiet">
          Steadrail takes a power stage as drawn, shows what decides whether its output settles or rings, and proposes
          an error-amplifier network that holds its margins at every corner of line and load.
        </Text>
        <View style={styles.row}>
          <LinkButton kind="primary" label="Start a design" href="/start" />
          <LinkButton label="Open a design document" href="/open" />
        </View>
        <Text variant="small" tone="quiet">
          No account needed. Your design stays in this browser; only figures travel to the server to be computed.
        </Text>
      </View>
      <HeroRule />
      <View role="list" style={isWide ? styles.stepsWide : styles.steps}>
        {STEPS.map((step, index) => (
          <StepCard key={step.title} number={index + 1} {...step} />
        ))}
      </View>
      <View style={styles.samples}>
        <Text variant="title" heading={2}>
          Open a worked sample
        </Text>
        <Text tone="quiet">Rails of an invented company that makes harbour water-level loggers.</Text>
        <SampleCards />
      </View>
    </Page>
  )
}

function StepCard({ number, title, text }: { readonly number: number; readonly title: string; readonly text: string }) {
  const theme = useTheme()
  return (
    <View role="listitem" style={[styles.step, { borderTopColor: theme.accent }]}>
      <Text variant="value" tone="accent">
        {String(number)}
      </Text>
      <Text variant="heading" heading={2}>
        {title}
      </Text>
      <Text tone="quiet">{text}</Text>
    </View>
  )
}

const styles = StyleSheet.create({
  hero: { gap: space.lg, maxWidth: 820, paddingTop: space.lg },
  display: { maxWidth: 640 },
  phoneDisplay: { fontSize: 33.2, lineHeight: 38 },
  row: { flexDirection: 'row', flexWrap: 'wrap', gap: space.md },
  steps: { gap: space.xl },
  stepsWide: { flexDirection: 'row', gap: space.xl },
  step: { flex: 1, gap: space.xs, borderTopWidth: 3, paddingTop: space.md },
  samples: { gap: space.md, paddingTop: space.lg },
})

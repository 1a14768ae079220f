import { useRouter } from 'expo-router'
import { StyleSheet, View } from 'react-native'
import { CONTROL_NAMES, railSummary, TOPOLOGY_NAMES } from '@/components/design/summary'
import { Button } from '@/components/ui/Button'
import { Notice } from '@/components/ui/Notice'
import { ErrorState, Loading } from '@/components/ui/states'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { formatQuantity } from '@/converters/quantities'
import { draftStore } from '@/hooks/draft/store'
import { useOpenSampleMutation, useSamplesQuery } from '@/hooks/queries/samples'
import { useTheme } from '@/hooks/useTheme'
import type { SampleSummary } from '@/server/contract/samples'

/** Worked samples, each opened with one press. */
export function SampleCards() {
  const samples = useSamplesQuery()
  if (samples.error) {
    return (
      <ErrorState
        title="The samples did not come"
        text={samples.error.message}
        retry={{ onPress: () => void samples.refetch() }}
      />
    )
  }
  if (!samples.data) return <Loading label="Loading the worked samples" bars={[150, 150]} />
  if (samples.data.samples.length === 0) return <Text tone="quiet">There are no worked samples on this server.</Text>
  return (
    <View style={styles.list}>
      {samples.data.samples.map((sample) => (
        <SampleCard key={sample.slug} sample={sample} />
      ))}
    </View>
  )
}

function SampleCard({ sample }: { readonly sample: SampleSummary }) {
  const theme = useTheme()
  const router = useRouter()
  const open = useOpenSampleMutation()
  const start = () =>
    open.mutate(sample.slug, {
      onSuccess: ({ design, title }) => {
        draftStore.open({ ...design, name: design.name ?? title })
        router.push('/design/stage')
      },
    })
  return (
    <View style={[styles.card, { borderColor: theme.rule, backgroundColor: theme.sheet }]}>
      <Text variant="strong" heading={3}>
        {sample.title}
      </Text>
      <Text variant="smallValue">{railSummary(sample)}</Text>
      <Text variant="small" tone="quiet">
        {`${TOPOLOGY_NAMES[sample.topology]}, ${CONTROL_NAMES[sample.control]}, ${formatQuantity(sample.switchingFrequency, 'Hz')}`}
      </Text>
      <View style={styles.text}>
        <Text variant="small">{sample.summary}</Text>
      </View>
      {open.isError ? (
        <Notice kind="fault" isLive>
          {open.error.message}
        </Notice>
      ) : null}
      <View style={styles.left}>
        <Button
          label={open.isPending ? 'Opening' : 'Open'}
          spoken={`Open the sample ${sample.title}`}
          isDisabled={open.isPending}
          onPress={start}
        />
      </View>
    </View>
  )
}

const styles = StyleSheet.create({
  list: { flexDirection: 'row', flexWrap: 'wrap', gap: space.md },
  card: {
    flexGrow: 1,
    flexBasis: 260,
    maxWidth: 620,
    borderWidth: 1,
    borderRadius: 8,
    padding: space.lg,
    gap: space.xs,
  },
  text: { flexGrow: 1, paddingVertical: space.xs },
  left: { alignSelf: 'flex-start' },
})

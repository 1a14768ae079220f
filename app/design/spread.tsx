import Head from 'expo-router/head'
import { StyleSheet, View } from 'react-native'
import { CornersView } from '@/components/spread/CornersView'
import { SamplesView } from '@/components/spread/SamplesView'
import { useView } from '@/components/spread/Views'
import { WaveformsView } from '@/components/spread/WaveformsView'
import { EmptyState } from '@/components/ui/states'
import { space } from '@/constants/theme'
import { useDraft } from '@/hooks/draft/useDraft'

const VIEWS = { corners: CornersView, samples: SamplesView, waveforms: WaveformsView } as const

export default function SpreadScreen() {
  const hasNetwork = useDraft().design.compensator != null
  const Chosen = VIEWS[useView()]
  return (
    <>
      <Head>
        <title>Spread · Steadrail</title>
      </Head>
      {hasNetwork ? <Chosen /> : <NoLoop />}
    </>
  )
}

function NoLoop() {
  return (
    <View style={styles.empty}>
      <EmptyState
        title="There is no loop yet that could spread"
        text="Corners, samples and waveforms need a network that closes the loop. Have parts proposed and take one over."
        action="Go to Loop"
        href="/design/loop"
      />
    </View>
  )
}

const styles = StyleSheet.create({ empty: { padding: space.lg } })

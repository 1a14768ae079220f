import Head from 'expo-router/head'
import { StyleSheet, View } from 'react-native'
import { Caution, Warnings } from '@/components/design/Cautions'
import { Columns } from '@/components/design/Columns'
import { EntryNotice } from '@/components/design/EntryNotice'
import { Fault } from '@/components/design/Fault'
import { OperatingFigures } from '@/components/design/OperatingFigures'
import { Ceiling } from '@/components/plant/Ceiling'
import { ClosedForms } from '@/components/plant/ClosedForms'
import { PointChips } from '@/components/plant/PointChips'
import { Responses } from '@/components/plant/Responses'
import { RootsTable } from '@/components/plant/RootsTable'
import { PoleZeroMap } from '@/components/plots/PoleZeroMap'
import { upperHalf, type PlaneRoot } from '@/components/plots/sPlane'
import { LinkButton } from '@/components/ui/Button'
import { Card } from '@/components/ui/Card'
import { Loading } from '@/components/ui/states'
import { Text } from '@/components/ui/Text'
import type { Plant } from '@/converters/results'
import { useDesignAnalysis } from '@/hooks/useDesignAnalysis'

export default function PlantScreen() {
  const { analysis, error, isStale, retry } = useDesignAnalysis()
  const waiting = error ? null : <Loading label="Computing the plant" bars={[180, 320]} />
  return (
    <>
      <Head>
        <title>Plant · Steadrail</title>
      </Head>
      <Columns
        phoneOrder={['inputs', 'curves', 'figures']}
        inputs={
          <>
            <EntryNotice />
            {error ? <Fault error={error} isStale={isStale} onRetry={retry} /> : null}
            <PointChips />
            {analysis ? (
              <>
                <OperatingFigures point={analysis.operatingPoint} />
                <Ceiling zeros={analysis.plant.zeros} />
                <Warnings warnings={analysis.warnings} />
                <Card title="Poles and zeros">
                  <RootsTable
                    label="Poles and zeros of the plant"
                    poles={analysis.plant.poles}
                    zeros={analysis.plant.zeros}
                  />
                </Card>
              </>
            ) : (
              waiting
            )}
          </>
        }
        curves={
          analysis ? (
            <>
              <Card>
                <Responses analysis={analysis} />
              </Card>
              <Card title="Closed forms">
                <ClosedForms forms={analysis.plant.closedForms} />
              </Card>
            </>
          ) : (
            waiting
          )
        }
        figures={
          analysis ? (
            <>
              <Card>
                <PoleZeroMap title="Where they stand" fileName="steadrail-s-plane" roots={planeRoots(analysis.plant)} />
                <Text variant="small" tone="quiet">
                  Direction is damping, distance is frequency. Of each pair the upper one is drawn.
                </Text>
              </Card>
              <View style={styles.next}>
                <LinkButton kind="primary" icon="arrow" label="To the loop" href="/design/loop" />
              </View>
              <Caution />
            </>
          ) : null
        }
      />
    </>
  )
}

function planeRoots({ poles, zeros }: Plant): PlaneRoot[] {
  return [
    ...upperHalf(poles).map((root) => ({ root, kind: 'pole' as const, owner: 'stage' as const })),
    ...upperHalf(zeros).map((root) => ({ root, kind: 'zero' as const, owner: 'stage' as const })),
  ]
}

const styles = StyleSheet.create({ next: { alignSelf: 'flex-start' } })

import { memo, useState } from 'react'
import { StyleSheet, View } from 'react-native'
import { Fault } from '@/components/design/Fault'
import { PoleZeroMap } from '@/components/plots/PoleZeroMap'
import { pointOf, upperHalf, type PlaneRoot } from '@/components/plots/sPlane'
import { Button } from '@/components/ui/Button'
import { Card } from '@/components/ui/Card'
import { Text } from '@/components/ui/Text'
import type { RootLocus } from '@/converters/results'
import { operatingPointOf } from '@/hooks/draft/schema'
import { useDraft } from '@/hooks/draft/useDraft'
import { useRootLocusQuery } from '@/hooks/queries/rootLocus'
import type { Analysis } from '@/server/contract/analyses'

export interface ClosedLoopMapProps {
  readonly analysis: Analysis
  readonly loop: NonNullable<Analysis['loop']>
}

/** The closed-loop poles beside what the stage had alone, and on request the ways that they take with the gain. */
export const ClosedLoopMap = memo(function ClosedLoopMap({ analysis, loop }: ClosedLoopMapProps) {
  const { design, point } = useDraft()
  const [isLocusShown, setLocusShown] = useState(false)
  const locus = useRootLocusQuery(design, operatingPointOf(design, point), isLocusShown)
  const shown = isLocusShown ? locus.data : undefined
  return (
    <Card>
      <PoleZeroMap
        title="Closed-loop poles"
        fileName="steadrail-closed-loop"
        roots={loopRoots(analysis, loop)}
        {...(shown ? { branches: shown.branches.map((branch) => branch.map(pointOf)) } : {})}
      />
      <Text variant="small" tone="quiet">
        Copper: the loop closed. Teal: the power stage alone. Direction is damping, distance is frequency.
      </Text>
      <View style={styles.left}>
        <Button
          label={isLocusShown ? 'Hide the root locus' : 'Show the root locus'}
          onPress={() => setLocusShown((before) => !before)}
        />
      </View>
      {isLocusShown && locus.error ? <Fault error={locus.error} onRetry={() => void locus.refetch()} /> : null}
      {shown ? <Text live="polite">{rangeSentence(shown)}</Text> : null}
    </Card>
  )
})

/** The locus steps by whole decibels. */
const whole = (gain: number) => `${Math.round(gain)} dB`.replace('-', '−')

/** Between which gains the loop stays stable, in words. */
export function rangeSentence({ stableRange, gainsDb }: RootLocus): string {
  const from = gainsDb[0] ?? 0
  const to = gainsDb.at(-1) ?? 0
  const drawn = `Lines: where the poles go while the loop gain is scaled from ${whole(from)} to ${whole(to)}; the copper × are the present gain.`
  if (!stableRange) return `${drawn} At the present gain the loop is unstable.`
  const { lowestDb, highestDb } = stableRange
  const up = highestDb === null ? 'may rise as far as is drawn' : `may rise by at least ${whole(highestDb)}`
  const down = lowestDb === null ? 'may fall as far as is drawn' : `may fall by at least ${whole(-lowestDb)}`
  return `${drawn} The gain ${up} and ${down} before the loop becomes unstable.`
}

function loopRoots(analysis: Analysis, loop: ClosedLoopMapProps['loop']): PlaneRoot[] {
  return [
    ...upperHalf(loop.closedLoopPoles).map((root) => ({ root, kind: 'pole' as const, owner: 'loop' as const })),
    ...upperHalf(analysis.plant.poles).map((root) => ({ root, kind: 'pole' as const, owner: 'stage' as const })),
    ...upperHalf(analysis.plant.zeros).map((root) => ({ root, kind: 'zero' as const, owner: 'stage' as const })),
  ]
}

const styles = StyleSheet.create({ left: { alignSelf: 'flex-start' } })

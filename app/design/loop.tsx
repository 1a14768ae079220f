import Head from 'expo-router/head'
import { Caution, Warnings } from '@/components/design/Cautions'
import { Columns } from '@/components/design/Columns'
import { EntryNotice } from '@/components/design/EntryNotice'
import { Fault } from '@/components/design/Fault'
import { LoopFigures } from '@/components/loop/LoopFigures'
import { LoopPlot } from '@/components/loop/LoopPlot'
import { NetworkCard } from '@/components/loop/NetworkCard'
import { Steps } from '@/components/loop/Steps'
import { WindowCard } from '@/components/loop/WindowCard'
import { WizardCard } from '@/components/loop/WizardCard'
import { PointChips } from '@/components/plant/PointChips'
import { PoleZeroMap } from '@/components/plots/PoleZeroMap'
import { upperHalf, type PlaneRoot } from '@/components/plots/sPlane'
import { Card } from '@/components/ui/Card'
import { Notice } from '@/components/ui/Notice'
import { Loading } from '@/components/ui/states'
import { Text } from '@/components/ui/Text'
import type { Analysis, Loop } from '@/converters/results'
import { useDraft } from '@/hooks/draft/useDraft'
import { useCornersQuery } from '@/hooks/queries/corners'
import { useDesignAnalysis } from '@/hooks/useDesignAnalysis'
import { useProposals } from '@/hooks/useProposals'

export default function LoopScreen() {
  const { design } = useDraft()
  const { analysis, error, isStale, retry } = useDesignAnalysis()
  const proposals = useProposals()
  const corners = useCornersQuery(design)
  const hasNetwork = design.compensator != null
  const loop = hasNetwork ? analysis?.loop : null
  const margins = hasNetwork ? analysis?.margins : null
  const cornerSet = hasNetwork ? corners.data : undefined
  return (
    <>
      <Head>
        <title>Loop · Steadrail</title>
      </Head>
      <Columns
        phoneOrder={hasNetwork ? ['curves', 'inputs', 'figures'] : ['inputs', 'curves', 'figures']}
        inputs={
          <>
            {proposals.data ? (
              <WindowCard proposals={proposals.data} />
            ) : proposals.error ? (
              error ? null : (
                <Fault error={proposals.error} onRetry={() => void proposals.refetch()} />
              )
            ) : (
              <Loading label="Looking for the room that the crossover has" bars={[240]} />
            )}
            <NetworkCard />
            <WizardCard />
          </>
        }
        curves={
          <>
            <EntryNotice />
            {error ? <Fault error={error} isStale={isStale} onRetry={retry} /> : null}
            {analysis && loop && margins ? (
              <>
                <LoopFigures margins={margins} corners={cornerSet} targets={design.targets} />
                <PointChips />
                <Card>
                  <LoopPlot
                    loop={loop}
                    margins={margins}
                    corners={cornerSet}
                    frequencies={analysis.frequencies}
                    switchingFrequency={design.switchingFrequency}
                  />
                  <Text variant="small" tone="quiet">
                    The pale band is the spread over the corners of line and load.
                  </Text>
                </Card>
                <Warnings warnings={analysis.warnings} />
              </>
            ) : hasNetwork ? (
              error ? null : (
                <Loading label="Computing the loop" bars={[130, 460]} />
              )
            ) : (
              <Notice kind="note" title="The loop is open">
                <Text>
                  There is no network yet. Have parts proposed, take one of the networks over, and the loop gain, its
                  margins at every corner and the steps appear here.
                </Text>
              </Notice>
            )}
          </>
        }
        figures={analysis && loop ? <LoopDetails analysis={analysis} loop={loop} /> : <Caution />}
      />
    </>
  )
}

function LoopDetails({ analysis, loop }: { readonly analysis: Analysis; readonly loop: Loop }) {
  return (
    <>
      {analysis.steps ? (
        <Steps steps={analysis.steps} />
      ) : (
        <Notice kind="fault">The closed loop does not settle, so there are no step responses to show.</Notice>
      )}
      <Card>
        <PoleZeroMap title="Closed-loop poles" fileName="steadrail-closed-loop" roots={loopRoots(analysis, loop)} />
        <Text variant="small" tone="quiet">
          Copper: the loop closed. Teal: the power stage alone. Direction is damping, distance is frequency.
        </Text>
      </Card>
      <Caution />
    </>
  )
}

function loopRoots(analysis: Analysis, loop: Loop): PlaneRoot[] {
  return [
    ...upperHalf(loop.closedLoopPoles).map((root) => ({ root, kind: 'pole' as const, owner: 'loop' as const })),
    ...upperHalf(analysis.plant.poles).map((root) => ({ root, kind: 'pole' as const, owner: 'stage' as const })),
    ...upperHalf(analysis.plant.zeros).map((root) => ({ root, kind: 'zero' as const, owner: 'stage' as const })),
  ]
}

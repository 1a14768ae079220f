import Head from 'expo-router/head'
import { memo, useDeferredValue } from 'react'
import { Caution, Warnings } from '@/components/design/Cautions'
import { Columns } from '@/components/design/Columns'
import { EntryNotice } from '@/components/design/EntryNotice'
import { Fault } from '@/components/design/Fault'
import { ClosedLoopMap } from '@/components/loop/ClosedLoopMap'
import { LoopFigures } from '@/components/loop/LoopFigures'
import { LoopPlot } from '@/components/loop/LoopPlot'
import { NetworkCard } from '@/components/loop/NetworkCard'
import { Steps } from '@/components/loop/Steps'
import { WindowCard } from '@/components/loop/WindowCard'
import { WizardCard } from '@/components/loop/WizardCard'
import { PointChips } from '@/components/plant/PointChips'
import { Responses } from '@/components/plant/Responses'
import { Card } from '@/components/ui/Card'
import { Notice } from '@/components/ui/Notice'
import { Loading } from '@/components/ui/states'
import { Text } from '@/components/ui/Text'
import { useDraft } from '@/hooks/draft/useDraft'
import { useCornersQuery } from '@/hooks/queries/corners'
import { useDesignAnalysis } from '@/hooks/useDesignAnalysis'
import { useProposals } from '@/hooks/useProposals'
import type { Analysis } from '@/server/contract/analyses'

export default function LoopScreen() {
  const hasNetwork = useDraft().design.compensator != null
  return (
    <>
      <Head>
        <title>Loop · Steadrail</title>
      </Head>
      {hasNetwork ? <ClosedLoop /> : <OpenLoop />}
    </>
  )
}

/** Where the crossover may sit: the first thing to know, with or without a network. */
function Room() {
  const { error } = useDesignAnalysis()
  const proposals = useProposals()
  if (proposals.data) return <WindowCard proposals={proposals.data} />
  if (!proposals.error) return <Loading label="Looking for the room that the crossover has" bars={[240]} />
  // Where the design itself is at fault, that is said beside it.
  return error ? null : <Fault error={proposals.error} onRetry={() => void proposals.refetch()} />
}

function Faults() {
  const { error, isStale, retry } = useDesignAnalysis()
  return (
    <>
      <EntryNotice />
      {error ? <Fault error={error} isStale={isStale} onRetry={retry} /> : null}
    </>
  )
}

/** No network yet: the room for the crossover, what there is to work with, and the networks to choose from. */
function OpenLoop() {
  const { analysis } = useDesignAnalysis()
  return (
    <Columns
      phoneOrder={['inputs', 'curves', 'figures']}
      inputs={
        <>
          <Faults />
          <Room />
        </>
      }
      curves={
        <>
          <Notice kind="note" title="The loop is open">
            <Text>
              There is no network yet. Have parts proposed and take one of the networks over: the loop gain, its margins
              at every corner and the steps appear here.
            </Text>
          </Notice>
          <WizardCard />
        </>
      }
      figures={
        <>
          {analysis ? (
            <Card>
              <Responses analysis={analysis} />
            </Card>
          ) : null}
          <Caution />
        </>
      }
    />
  )
}

function ClosedLoop() {
  const { design } = useDraft()
  const { analysis, error } = useDesignAnalysis()
  const corners = useCornersQuery(design)
  const { loop, margins } = analysis ?? {}
  // Figures and curves come first; the drawings beside them may follow a moment later.
  const details = useDeferredValue(analysis)
  return (
    <Columns
      phoneOrder={['curves', 'inputs', 'figures']}
      inputs={
        <>
          <Room />
          <NetworkCard />
          <WizardCard />
        </>
      }
      curves={
        <>
          <Faults />
          {analysis && loop && margins ? (
            <>
              <LoopFigures margins={margins} corners={corners.data} targets={design.targets} />
              <PointChips />
              <Card>
                <LoopPlot loop={loop} margins={margins} corners={corners.data} frequencies={analysis.frequencies} />
                <Text variant="small" tone="quiet">
                  The pale band is the spread over the corners of line and load.
                </Text>
              </Card>
              <Warnings warnings={analysis.warnings} />
            </>
          ) : error ? null : (
            <Loading label="Computing the loop" bars={[130, 460]} />
          )}
        </>
      }
      figures={details?.loop ? <LoopDetails analysis={details} loop={details.loop} /> : <Caution />}
    />
  )
}

type Loop = NonNullable<Analysis['loop']>

const LoopDetails = memo(function LoopDetails({
  analysis,
  loop,
}: {
  readonly analysis: Analysis
  readonly loop: Loop
}) {
  return (
    <>
      {analysis.steps ? (
        <Steps steps={analysis.steps} />
      ) : (
        <Notice kind="fault">The closed loop does not settle, so there are no step responses to show.</Notice>
      )}
      <ClosedLoopMap analysis={analysis} loop={loop} />
      <Caution />
    </>
  )
})

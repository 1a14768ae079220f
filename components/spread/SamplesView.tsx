import { memo } from 'react'
import { StyleSheet, View } from 'react-native'
import { Bands } from './Bands'
import { Distributions } from './Distributions'
import { Failures } from './Failures'
import { PlacedFigures } from './PlacedFigures'
import { PoleCloud } from './PoleCloud'
import { Regression } from './Regression'
import { RunCard } from './RunCard'
import { useStatisticalRun, type StatisticalRun } from './useStatisticalRun'
import { VariedValues } from './VariedValues'
import { ViewChips } from './Views'
import { count } from './words'
import { Yields } from './Yields'
import { Caution } from '@/components/design/Cautions'
import { Columns } from '@/components/design/Columns'
import { EntryNotice } from '@/components/design/EntryNotice'
import { Fault } from '@/components/design/Fault'
import { Button } from '@/components/ui/Button'
import { Card } from '@/components/ui/Card'
import { Notice } from '@/components/ui/Notice'
import { ErrorState, Loading } from '@/components/ui/states'
import { Text } from '@/components/ui/Text'
import type { Root } from '@/converters/results'
import { useDesignAnalysis } from '@/hooks/useDesignAnalysis'
import type { SpreadResult } from '@/server/contract/spreadRuns'

/** Thousands of converters as production would build them: how many hold, how the figures spread, and why. */
export function SamplesView() {
  const statistics = useStatisticalRun()
  const { analysis } = useDesignAnalysis()
  const { run, design, isOlder, isLoading, error } = statistics
  const outcome = run?.result ?? run?.interim ?? null
  const result = run?.result ?? null
  return (
    <Columns
      phoneOrder={['inputs', 'curves', 'figures']}
      inputs={
        <>
          <ViewChips />
          <EntryNotice />
          {error ? <Fault error={error} onRetry={statistics.retry} /> : null}
          <RunCard statistics={statistics} />
          <Standing statistics={statistics} />
        </>
      }
      curves={
        outcome ? (
          <>
            <Yields outcome={outcome} confidence={result?.confidence} />
            <Distributions outcome={outcome} targets={design.targets} />
            {result?.bands ? <Bands bands={result.bands} /> : null}
          </>
        ) : isLoading && !error ? (
          <Loading label="Fetching the run" bars={[220, 460]} />
        ) : run ? null : (
          <Notice kind="note" title="No run yet">
            A run draws each sample as production would build it, and says how many hold their aims.
          </Notice>
        )
      }
      figures={
        <>
          {result ? (
            <Reasons
              result={result}
              nominal={isOlder ? NONE : (analysis?.loop?.closedLoopPoles ?? NONE)}
              switchingFrequency={design.switchingFrequency}
            />
          ) : null}
          <Caution />
        </>
      }
    />
  )
}

const NONE: readonly Root[] = []

/** How the kept run ended, where that needs a word. */
function Standing({ statistics }: { readonly statistics: StatisticalRun }) {
  const { run, isOlder, isGone, isBusy, start } = statistics
  if (isGone) {
    return (
      <Notice kind="note" title="The last run is no longer kept">
        Runs are kept for a day. Start it again: the same seed gives the same samples.
      </Notice>
    )
  }
  if (!run) return null
  return (
    <>
      {run.state === 'cancelled' ? (
        <Notice kind="note" title="The run was cancelled" isLive>
          {`After ${count(run.evaluations.done)} of ${count(run.evaluations.total)} samples. ${run.interim ? 'The figures are those of the samples so far.' : 'None had been summed up yet.'}`}
        </Notice>
      ) : null}
      {run.state === 'failed' ? (
        <ErrorState
          title="The run did not come to its end"
          text={run.problem?.detail ?? run.problem?.title ?? 'The server says no more.'}
          retry={{ onPress: start }}
        />
      ) : null}
      {isOlder ? (
        <Notice kind="caution" title="Of an earlier state of the design">
          <Text variant="small">The design has changed since this run was started. The figures do not follow it.</Text>
          {isBusy ? null : (
            <View style={styles.left}>
              <Button label="Run again with the design as it is" onPress={start} />
            </View>
          )}
        </Notice>
      ) : null}
    </>
  )
}

interface ReasonsProps {
  readonly result: SpreadResult
  readonly nominal: readonly Root[]
  readonly switchingFrequency: number // Hz
}

const Reasons = memo(function Reasons({ result, nominal, switchingFrequency }: ReasonsProps) {
  const { worst, quantities, targets, conductionNotModelled } = result
  return (
    <>
      <Failures failures={result.failures} of="samples" />
      {conductionNotModelled > 0 ? (
        <Notice kind="caution" title="Outside what is computed">
          {`In ${count(conductionNotModelled)} samples the rectifier's current would reverse, which is not modelled for this topology.`}
        </Notice>
      ) : null}
      <Regression regression={result.regression} />
      {result.closedLoopPoles.length > 0 ? (
        <PoleCloud poles={result.closedLoopPoles} nominal={nominal} switchingFrequency={switchingFrequency} />
      ) : null}
      {worst ? (
        <Card title="Worst sample">
          <PlacedFigures placed={worst} targets={targets} />
          <VariedValues label="Values of the worst sample" quantities={quantities} values={worst.values} />
        </Card>
      ) : null}
    </>
  )
})

const styles = StyleSheet.create({ left: { alignSelf: 'flex-start' } })

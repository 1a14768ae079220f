import { useState } from 'react'
import { LimitFields, readLimits } from './Limits'
import { Modes } from './Modes'
import { PeriodMapCard } from './PeriodMapCard'
import { Readings } from './Readings'
import { ViewChips } from './Views'
import { Waveforms } from './Waveforms'
import { Caution } from '@/components/design/Cautions'
import { Columns } from '@/components/design/Columns'
import { EntryNotice } from '@/components/design/EntryNotice'
import { Fault } from '@/components/design/Fault'
import { Card } from '@/components/ui/Card'
import { Choice } from '@/components/ui/Choice'
import { Loading } from '@/components/ui/states'
import { Text } from '@/components/ui/Text'
import { useDraft } from '@/hooks/draft/useDraft'
import { useSimulationQuery } from '@/hooks/queries/simulations'
import { useKeptSpread } from '@/hooks/spread/keptSpread'
import { useLast } from '@/hooks/useLast'

const SCENARIOS = [
  { value: 'load-step', label: 'Load step', words: 'The load jumps from half to full and stays there.' },
  { value: 'line-step', label: 'Line step', words: 'The line jumps from nominal to its highest.' },
  { value: 'soft-start', label: 'Soft start', words: 'The wanted output rises from zero at full load.' },
  { value: 'overload', label: 'Overload', words: 'More than full load for a while, then full load again.' },
] as const
type ScenarioKind = (typeof SCENARIOS)[number]['value']

/** The closed loop cycle by cycle, limits of duty and amplifier included, beside the averaged prediction. */
export function WaveformsView() {
  const { design } = useDraft()
  const { limits: texts } = useKeptSpread()
  const [kind, setKind] = useState<ScenarioKind>('load-step')
  const query = useSimulationQuery(design, { scenario: { kind } })
  const last = useLast(query.data)
  const { error } = query
  // An answer to another scenario is not shown under this one's name.
  const simulation = query.isPlaceholderData && error === null ? undefined : last
  const limits = readLimits(texts, design)
  const scenario = SCENARIOS.find(({ value }) => value === kind) ?? SCENARIOS[0]
  return (
    <Columns
      phoneOrder={['inputs', 'curves', 'figures']}
      inputs={
        <>
          <ViewChips />
          <EntryNotice />
          <Card title="Disturbance">
            <Choice label="Disturbance" isLabelHidden value={kind} options={SCENARIOS} onChange={setKind} />
            <Text variant="small" tone="quiet">
              {scenario.words}
            </Text>
          </Card>
          <LimitFields limits={limits} />
        </>
      }
      curves={
        error ? (
          <Fault error={error} isStale={false} onRetry={() => void query.refetch()} />
        ) : simulation ? (
          <>
            <Readings simulation={simulation} limits={limits} />
            <Waveforms simulation={simulation} name={scenario.label} limits={limits} design={design} />
          </>
        ) : (
          <Loading label="Running the converter cycle by cycle" bars={[180, 300, 220]} />
        )
      }
      figures={
        <>
          {simulation && !error ? (
            <>
              <PeriodMapCard map={simulation.map} alternates={simulation.readings.alternates} />
              {simulation.prediction ? <Modes prediction={simulation.prediction} /> : null}
            </>
          ) : null}
          <Caution />
        </>
      }
    />
  )
}

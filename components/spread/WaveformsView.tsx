import { useState } from 'react'
import { LimitFields, readLimits } from './Limits'
import { Modes } from './Modes'
import { PeriodMapCard } from './PeriodMapCard'
import { Readings, StartReadings } from './Readings'
import { ViewChips } from './Views'
import { Waveforms } from './Waveforms'
import { Caution, Warnings } from '@/components/design/Cautions'
import { Columns } from '@/components/design/Columns'
import { EntryNotice } from '@/components/design/EntryNotice'
import { Fault } from '@/components/design/Fault'
import { Card } from '@/components/ui/Card'
import { Choice } from '@/components/ui/Choice'
import { Loading } from '@/components/ui/states'
import { Text } from '@/components/ui/Text'
import type { Warning } from '@/converters/results'
import { useDraft } from '@/hooks/draft/useDraft'
import { useSimulationQuery } from '@/hooks/queries/simulations'
import { useKeptSpread } from '@/hooks/spread/keptSpread'
import { useDesignAnalysis } from '@/hooks/useDesignAnalysis'
import { useLast } from '@/hooks/useLast'

const SCENARIOS = [
  { value: 'load-step', label: 'Load step', words: 'The upper half of the load range comes at once and stays.' },
  { value: 'line-step', label: 'Line step', words: 'The line jumps from its lowest to its highest at full load.' },
  {
    value: 'soft-start',
    label: 'Soft start',
    words: 'At full load the wanted output rises from zero over 400 periods.',
  },
  { value: 'overload', label: 'Overload', words: 'Twice full load for 200 periods, then full load again.' },
] as const
type ScenarioKind = (typeof SCENARIOS)[number]['value']

/** What the analysis has to say of the same matter as the period map, cures with it. */
const SWITCHING: readonly Warning['code'][] = [
  'subharmonic-oscillation',
  'unstable-orbit',
  'unstable-switching',
  'unstable-loop',
]

/** The closed loop cycle by cycle, limits of duty and amplifier included, beside the averaged prediction. */
export function WaveformsView() {
  const { design } = useDraft()
  const { limits: texts } = useKeptSpread()
  const [kind, setKind] = useState<ScenarioKind>('load-step')
  const query = useSimulationQuery(design, { scenario: { kind } })
  const last = useLast(query.data)
  const { error } = query
  const { analysis } = useDesignAnalysis()
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
            {kind === 'soft-start' ? (
              <StartReadings simulation={simulation} limits={limits} wanted={design.output.voltage} />
            ) : (
              <Readings simulation={simulation} limits={limits} />
            )}
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
              <Warnings warnings={(analysis?.warnings ?? []).filter(({ code }) => SWITCHING.includes(code))} />
              {simulation.prediction ? <Modes prediction={simulation.prediction} /> : null}
            </>
          ) : null}
          <Caution />
        </>
      }
    />
  )
}

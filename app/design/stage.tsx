import Head from 'expo-router/head'
import { useState } from 'react'
import { Caution, Warnings } from '@/components/design/Cautions'
import { Columns } from '@/components/design/Columns'
import { EntryNotice } from '@/components/design/EntryNotice'
import { Fault } from '@/components/design/Fault'
import { OperatingFigures } from '@/components/design/OperatingFigures'
import { StageSchematic } from '@/components/schematic/StageSchematic'
import type { StagePart } from '@/components/schematic/stageParts'
import { AmplifierFields, ModulatorFields } from '@/components/stage/ControlFields'
import {
  BanksFields,
  CouplingCapacitorFields,
  InductorFields,
  LineFields,
  LoadFields,
  RectifierFields,
  SecondInductorFields,
  SwitchFields,
  TransformerFields,
} from '@/components/stage/groups'
import { InputFilterFields } from '@/components/stage/InputFilterFields'
import { PartSheet } from '@/components/stage/PartSheet'
import { StressTable } from '@/components/stage/StressTable'
import { TargetFields } from '@/components/stage/TargetFields'
import { ToleranceFields } from '@/components/stage/ToleranceFields'
import { TopologyField } from '@/components/stage/TopologyField'
import { Card } from '@/components/ui/Card'
import { LinkButton } from '@/components/ui/Button'
import { Loading } from '@/components/ui/states'
import { Text } from '@/components/ui/Text'
import { hasPart } from '@/hooks/draft/edits'
import { useDraft } from '@/hooks/draft/useDraft'
import { useDesignAnalysis } from '@/hooks/useDesignAnalysis'
import { useLayout } from '@/hooks/useLayout'

export default function StageScreen() {
  const { design } = useDraft()
  const { topology } = design
  const hasTwo = hasPart(topology, 'secondInductor')
  const { isExtraWide } = useLayout()
  const { analysis, error, isStale, retry } = useDesignAnalysis()
  const [part, setPart] = useState<StagePart | null>(null)
  return (
    <>
      <Head>
        <title>Stage · Steadrail</title>
      </Head>
      <Columns
        phoneOrder={['curves', 'figures', 'inputs']}
        inputs={
          <>
            <Card title="Circuit, line and load">
              <TopologyField />
              <LineFields />
              <LoadFields />
            </Card>
            <Card title="Switch and rectifier">
              <SwitchFields />
              <RectifierFields />
            </Card>
            {hasPart(topology, 'transformer') ? (
              <Card title="Transformer">
                <TransformerFields />
                {topology === 'flyback' ? <InductorFields /> : null}
              </Card>
            ) : null}
            {topology === 'flyback' ? null : (
              <Card title={hasTwo ? 'First inductor' : 'Inductor'}>
                <InductorFields />
              </Card>
            )}
            {hasTwo ? (
              <>
                <Card title="Second inductor">
                  <SecondInductorFields />
                </Card>
                <Card title="Coupling capacitor">
                  <CouplingCapacitorFields />
                </Card>
              </>
            ) : null}
            <Card title="Output capacitors">
              <BanksFields />
            </Card>
            <Card title="Input filter">
              <InputFilterFields />
            </Card>
            {isExtraWide ? null : <ControlCards />}
          </>
        }
        curves={
          <>
            <EntryNotice />
            {error ? <Fault error={error} isStale={isStale} onRetry={retry} /> : null}
            <Card
              title="Power stage"
              action={<LinkButton kind="quiet" icon="arrow" label="See the plant" href="/design/plant" />}
            >
              <StageSchematic design={design} onPart={setPart} />
              <Text variant="small" tone="quiet">
                Press a part to change it. Values are taken as you write them: 4.7u, 22 µF, 2k2, 0R01, 1,5 m.
              </Text>
            </Card>
            {analysis ? <Warnings warnings={analysis.warnings} /> : null}
            {isExtraWide ? <ControlCards /> : null}
          </>
        }
        figures={
          analysis ? (
            <>
              <OperatingFigures point={analysis.operatingPoint} />
              <StressTable point={analysis.operatingPoint} />
              <Caution />
            </>
          ) : error ? null : (
            <Loading label="Computing the operating point" bars={[210, 260]} />
          )
        }
      />
      <PartSheet part={part} onClose={() => setPart(null)} />
    </>
  )
}

/** The way back from the output: below the schematic where there is room, after the stage's parts otherwise. */
function ControlCards() {
  return (
    <>
      <Card title="Modulator">
        <ModulatorFields />
      </Card>
      <Card title="Error amplifier and divider">
        <AmplifierFields />
      </Card>
      <Card title="What the loop should hold">
        <TargetFields />
      </Card>
      <Card title="Tolerances">
        <ToleranceFields />
      </Card>
    </>
  )
}

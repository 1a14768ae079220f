import { useState } from 'react'
import { StyleSheet, View } from 'react-native'
import { ProposalCard } from './ProposalCard'
import { ProposalTable } from './ProposalTable'
import { PlacementFields, usePlacement } from './Placement'
import { Button } from '@/components/ui/Button'
import { Card } from '@/components/ui/Card'
import { Choice } from '@/components/ui/Choice'
import { Notice } from '@/components/ui/Notice'
import { Select } from '@/components/ui/Select'
import { Loading } from '@/components/ui/states'
import { Fault } from '@/components/design/Fault'
import { Fields } from '@/components/design/Fields'
import { space } from '@/constants/theme'
import type { CompensatorType } from '@/converters/document'
import { draftStore } from '@/hooks/draft/store'
import { useDraft } from '@/hooks/draft/useDraft'
import { useCompensatorsQuery } from '@/hooks/queries/compensators'
import { PREFERRED_SERIES } from '@/server/contract/compensators'

type Wish = 'suggested' | CompensatorType

const WISHES: readonly { readonly value: Wish; readonly label: string }[] = [
  { value: 'suggested', label: 'As suggested' },
  { value: 'I', label: 'I' },
  { value: 'II', label: 'II' },
  { value: 'III', label: 'III' },
]

const AIMS: readonly { readonly value: 'margin' | 'crossover'; readonly label: string }[] = [
  { value: 'margin', label: 'Most margin' },
  { value: 'crossover', label: 'Highest crossover' },
]

const SERIES = PREFERRED_SERIES.map((value) => ({ value, label: value }))

/** Proposes networks in values that can be bought. */
export function WizardCard() {
  const { design, series } = useDraft()
  const [chosen, setWish] = useState<Wish>('suggested')
  // The fast lane through the LED brings a zero of its own: there is no type I.
  const isShunt = design.amplifier.kind === 'shunt-optocoupler'
  const wish = isShunt && chosen === 'I' ? 'suggested' : chosen
  const [aim, setAim] = useState<'margin' | 'crossover'>('margin')
  const [isShown, setShown] = useState(false)
  const placement = usePlacement(design)
  const query = useCompensatorsQuery(design, {
    resistorSeries: series.resistors,
    capacitorSeries: series.capacitors,
    aim,
    ...(wish === 'suggested' ? {} : { type: wish }),
    ...(placement.value ? { placement: placement.value } : {}),
  })
  const proposals = query.data?.proposals ?? []
  return (
    <Card title="Propose a network">
      <Choice
        label="Type"
        value={wish}
        options={isShunt ? WISHES.filter(({ value }) => value !== 'I') : WISHES}
        onChange={setWish}
      />
      {/* A crossover of one's own leaves nothing to choose here. */}
      {design.targets.crossover === null ? (
        <Choice label="What the optimiser is after" value={aim} options={AIMS} onChange={setAim} />
      ) : null}
      <Fields>
        <Select
          label="Resistor series"
          value={series.resistors}
          options={SERIES}
          onChange={(resistors) => draftStore.chooseSeries({ ...series, resistors })}
        />
        <Select
          label="Capacitor series"
          value={series.capacitors}
          options={SERIES}
          onChange={(capacitors) => draftStore.chooseSeries({ ...series, capacitors })}
        />
      </Fields>
      <PlacementFields placement={placement} />
      {isShown ? null : (
        <View style={styles.left}>
          <Button kind="primary" label="Propose parts" onPress={() => setShown(true)} />
        </View>
      )}
      {isShown ? (
        <View style={styles.list}>
          {query.error ? <Fault error={query.error} onRetry={() => void query.refetch()} /> : null}
          {query.isPending ? <Loading label="Looking for networks" bars={[160]} /> : null}
          {query.data && proposals.length === 0 ? (
            <Notice kind="fault" title="Nothing to propose" isLive>
              {query.data.refusal ?? 'No network of this type meets the wish. Try another type or another crossover.'}
            </Notice>
          ) : null}
          {proposals.length > 1 ? <ProposalTable proposals={proposals} series={series} /> : null}
          {proposals.map((proposal, index) => (
            <ProposalCard key={index} proposal={proposal} isFirst={index === 0} targets={design.targets} />
          ))}
        </View>
      ) : null}
    </Card>
  )
}

const styles = StyleSheet.create({
  left: { alignSelf: 'flex-start' },
  list: { gap: space.md },
})

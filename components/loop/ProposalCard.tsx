import { useState } from 'react'
import { StyleSheet, View } from 'react-native'
import { proposalName } from './proposalName'
import { figure, verdictOf } from '@/components/format'
import { Button } from '@/components/ui/Button'
import { VerdictWord } from '@/components/ui/Figure'
import { Notice } from '@/components/ui/Notice'
import { Table } from '@/components/ui/Table'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { COMPENSATOR_PARTS, type DesignDocument } from '@/converters/document'
import { formatQuantity } from '@/converters/quantities'
import type { MarginSummary, Proposal } from '@/converters/results'
import { draftStore } from '@/hooks/draft/store'
import { useDraft } from '@/hooks/draft/useDraft'
import { formatEntry } from '@/hooks/draft/entries'
import { useTheme } from '@/hooks/useTheme'

export interface ProposalCardProps {
  readonly proposal: Proposal
  readonly isFirst: boolean
  readonly targets: DesignDocument['targets']
}

/** One network: its parts ideal and preferred, its margins before and after, why, and what is still short. */
export function ProposalCard({ proposal, isFirst, targets }: ProposalCardProps) {
  const theme = useTheme()
  const { design } = useDraft()
  const { type, parts, margins, loadStepDip, reasons, shortfalls } = proposal
  const name = proposalName(proposal)
  const isFitted =
    design.compensator?.type === type &&
    COMPENSATOR_PARTS.every((part) => (design.compensator?.parts[part] ?? 0) === (parts.preferred[part] ?? 0))
  const worst = margins.preferred.worst
  return (
    <View
      role="group"
      aria-label={name}
      style={[styles.card, { borderColor: theme.rule, backgroundColor: theme.paper }]}
    >
      <Text variant="strong" heading={3}>
        {isFirst ? `${name} (recommended)` : name}
      </Text>
      <Table
        label={`Parts, ${name}`}
        columns={[
          { title: 'Part', width: 48 },
          { title: 'Ideal', width: 92, isNumber: true },
          { title: 'Preferred', width: 92, isNumber: true },
        ]}
        rows={COMPENSATOR_PARTS.filter((part) => parts.preferred[part]).map((part) => {
          const unit = part.startsWith('R') ? 'Ω' : 'F'
          return {
            key: part,
            cells: [part, figure(parts.ideal[part], unit), formatEntry(parts.preferred[part] ?? 0, unit)],
          }
        })}
      />
      <Table
        label={`Margins, ${name}`}
        columns={[
          { title: 'Figure', width: 66 },
          { title: 'Ideal', width: 72, isNumber: true },
          { title: 'Preferred', width: 72, isNumber: true },
          { title: 'Worst', width: 72, isNumber: true },
        ]}
        rows={[
          marginRow('Crossover', [margins.ideal.nominal, margins.preferred.nominal, worst], (m) =>
            figure(m.crossover, 'Hz'),
          ),
          marginRow('Phase', [margins.ideal.nominal, margins.preferred.nominal, worst], (m) =>
            m.isStable ? figure(m.phaseMargin, '°') : 'unstable',
          ),
          marginRow('Gain', [margins.ideal.nominal, margins.preferred.nominal, worst], (m) =>
            figure(m.gainMargin, 'dB'),
          ),
        ]}
      />
      <View style={styles.worst}>
        <Text variant="small" tone="quiet">
          {`Worst corner: ${formatQuantity(worst.lineVoltage, 'V')}, ${formatQuantity(worst.outputCurrent, 'A')}`}
        </Text>
        <VerdictWord verdict={(worst.isStable && verdictOf(worst.phaseMargin, targets.phaseMargin, '°')) || 'short'} />
      </View>
      {loadStepDip === null ? null : (
        <Text variant="small" tone="quiet">
          {`Half of the load range coming at once moves the output by ${figure(loadStepDip, 'V')} at most.`}
        </Text>
      )}
      {shortfalls.length > 0 ? (
        <Notice kind="caution" title="Still short">
          {shortfalls.map((text) => (
            <Text key={text} variant="small">
              {text}
            </Text>
          ))}
        </Notice>
      ) : null}
      <Reasons reasons={reasons} name={name} isOpenAtFirst={isFirst} />
      <View style={styles.left}>
        {isFitted ? (
          <Text variant="strong" tone="holds">
            ✓ These parts are fitted
          </Text>
        ) : (
          <Button
            kind={isFirst ? 'primary' : 'plain'}
            label="Use these parts"
            spoken={`Use these parts: ${name}`}
            onPress={() => draftStore.takeNetwork({ type, parts: parts.preferred })}
          />
        )}
      </View>
    </View>
  )
}

/** Why these parts: in view for the recommended network, folded away for the others. */
function Reasons({
  reasons,
  name,
  isOpenAtFirst,
}: {
  readonly reasons: readonly string[]
  readonly name: string
  readonly isOpenAtFirst: boolean
}) {
  const [isOpen, setOpen] = useState(isOpenAtFirst)
  return (
    <>
      <View style={styles.flush}>
        <Button
          kind="quiet"
          label={isOpen ? 'Hide the reasons' : 'Show the reasons'}
          spoken={`${isOpen ? 'Hide' : 'Show'} the reasons: ${name}`}
          onPress={() => setOpen(!isOpen)}
        />
      </View>
      {isOpen
        ? reasons.map((reason) => (
            <Text key={reason} variant="small" tone="quiet">
              {reason}
            </Text>
          ))
        : null}
    </>
  )
}

function marginRow(name: string, summaries: readonly MarginSummary[], write: (summary: MarginSummary) => string) {
  return { key: name, cells: [name, ...summaries.map(write)] }
}

const styles = StyleSheet.create({
  card: { borderWidth: 1, borderRadius: 8, padding: space.md, gap: space.sm },
  worst: { flexDirection: 'row', gap: space.sm, alignItems: 'baseline', flexWrap: 'wrap' },
  left: { alignSelf: 'flex-start' },
  flush: { alignSelf: 'flex-start', marginLeft: -space.sm },
})

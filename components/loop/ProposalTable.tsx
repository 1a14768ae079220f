import { proposalName } from './proposalName'
import { figure } from '@/components/format'
import { Table } from '@/components/ui/Table'
import { Text } from '@/components/ui/Text'
import type { Proposal } from '@/converters/results'
import type { SeriesChoice } from '@/hooks/draft/schema'

export interface ProposalTableProps {
  readonly proposals: readonly Proposal[]
  readonly series: SeriesChoice
}

/** All candidates beside each other: in preferred parts, margins at the worst corner of line and load. */
export function ProposalTable({ proposals, series }: ProposalTableProps) {
  return (
    <>
      <Table
        label="Networks compared"
        columns={[
          { title: 'Network', width: 112 },
          { title: 'Crossover', width: 76, isNumber: true },
          { title: 'Phase', width: 60, isNumber: true },
          { title: 'Gain', width: 66, isNumber: true },
          { title: 'Dip', width: 66, isNumber: true },
          { title: 'Parts', width: 42, isNumber: true },
        ]}
        rows={proposals.map((proposal, index) => ({ key: String(index), cells: cellsOf(proposal, index === 0) }))}
      />
      <Text variant="small" tone="quiet">
        {`Margins at the worst corner of line and load; dip after half of the load range at nominal line. Parts of ${series.resistors} and ${series.capacitors}, the divider’s resistor among them.`}
      </Text>
    </>
  )
}

function cellsOf(proposal: Proposal, isFirst: boolean): string[] {
  const { parts, margins, loadStepDip } = proposal
  const { worst, nominal } = margins.preferred
  return [
    isFirst ? `${proposalName(proposal)} (recommended)` : proposalName(proposal),
    figure(nominal.crossover, 'Hz'),
    worst.isStable ? figure(worst.phaseMargin, '°') : 'unstable',
    figure(worst.gainMargin, 'dB'),
    loadStepDip === null ? '–' : figure(Math.abs(loadStepDip), 'V'),
    String(Object.values(parts.preferred).filter(Boolean).length),
  ]
}

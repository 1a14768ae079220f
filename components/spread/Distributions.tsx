import { FIGURES, count, figureIn } from './words'
import { LaterHistogram } from '@/components/plots/later'
import { Card } from '@/components/ui/Card'
import { Table } from '@/components/ui/Table'
import { Text } from '@/components/ui/Text'
import type { DesignDocument } from '@/converters/document'
import type { Distribution, SpreadFigure } from '@/converters/spread/results'
import type { SpreadInterim } from '@/server/contract/spreadRuns'

export interface DistributionsProps {
  readonly outcome: SpreadInterim
  readonly targets: DesignDocument['targets']
}

/** How crossover and margins spread: a histogram each, with the aim across it, and their quantiles. */
export function Distributions({ outcome: { distributions }, targets }: DistributionsProps) {
  const aims: Partial<Record<SpreadFigure, number>> = {
    phaseMargin: targets.phaseMargin,
    gainMargin: targets.gainMargin,
  }
  return (
    <Card title="How the figures spread">
      <Table
        label="Quantiles"
        columns={[
          { title: 'Figure', width: 92 },
          { title: 'Least', width: 76, isNumber: true },
          { title: '5 %', width: 76, isNumber: true },
          { title: 'Median', width: 76, isNumber: true },
          { title: '95 %', width: 76, isNumber: true },
          { title: 'Largest', width: 76, isNumber: true },
        ]}
        rows={FIGURES.flatMap(({ key, label, unit }) => {
          const found = distributions[key]
          if (!found) return []
          const { minimum, maximum, quantiles } = found
          const values = [minimum, quantiles.p05, quantiles.p50, quantiles.p95, maximum]
          return [{ key, cells: [label, ...values.map((value) => figureIn(value, unit))] }]
        })}
      />
      {FIGURES.filter(({ key }) => key !== 'modulusMargin').map(({ key, label, unit }) => {
        const found = distributions[key]
        if (!found) return <Text key={key} tone="quiet">{`${label}: no sample has one.`}</Text>
        return (
          <LaterHistogram
            key={key}
            title={label}
            fileName={`steadrail-spread-${label.toLowerCase().replace(' ', '-')}`}
            summary={summaryOf(label, found, (value) => figureIn(value, unit))}
            unit={unit}
            edges={found.histogram.edges}
            counts={found.histogram.counts}
            {...(aims[key] === undefined ? {} : { aim: aims[key] })}
          />
        )
      })}
    </Card>
  )
}

function summaryOf(
  label: string,
  { quantiles, count: samples, absent }: Distribution,
  text: (value: number) => string,
) {
  const without = absent > 0 ? ` ${count(absent)} samples have none.` : ''
  return `${label} of ${count(samples)} samples: median ${text(quantiles.p50)}, 5 to 95 % from ${text(quantiles.p05)} to ${text(quantiles.p95)}.${without}`
}

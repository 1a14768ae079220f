import { useState } from 'react'
import { BarList } from './BarList'
import { FIGURES, sentence } from './words'
import { ratio } from '@/components/format'
import { Card } from '@/components/ui/Card'
import { Choice } from '@/components/ui/Choice'
import { Text } from '@/components/ui/Text'
import type { RegressionRanking, SpreadFigure } from '@/converters/spread/results'

/** Below it a linear model leaves so much unexplained that its coefficients are a hint only. */
const TRUSTED = 0.7
const MOST_SHOWN = 10

/** What moves a figure, by standardised regression coefficients. */
export function Regression({ regression }: { readonly regression: readonly RegressionRanking[] }) {
  const [wanted, setWanted] = useState<SpreadFigure>('phaseMargin')
  const ranking = regression.find(({ figure }) => figure === wanted) ?? regression[0]
  if (!ranking) return null
  const { determination, coefficients } = ranking
  return (
    <Card title="What counts most">
      <Choice
        label="Ranked for"
        value={ranking.figure}
        options={FIGURES.filter(({ key }) => regression.some(({ figure }) => figure === key)).map(({ key, label }) => ({
          value: key,
          label,
        }))}
        onChange={setWanted}
      />
      <BarList
        label="Standardised regression coefficients"
        isSigned
        items={coefficients.slice(0, MOST_SHOWN).map(({ key, label, value }) => ({
          key,
          name: sentence(label),
          text: `${value > 0 ? '+' : ''}${ratio(value, 2)}`,
          value,
        }))}
      />
      <Text variant="small" tone="quiet">
        {`Standardised regression coefficients: by how many of its standard deviations the figure moves when a quantity moves by one of its own. R² ${ratio(determination, 2)}: ${
          determination >= TRUSTED
            ? 'the linear model explains most of the spread.'
            : 'the linear model explains too little of the spread for more than a hint.'
        }`}
      </Text>
    </Card>
  )
}

import { figure } from '@/components/format'
import { Card } from '@/components/ui/Card'
import { Table } from '@/components/ui/Table'
import { Text } from '@/components/ui/Text'
import type { StepResponse } from '@/converters/results'

const MOST_SHOWN = 6
/** Of the leading one's amplitude; what is smaller cannot be seen. */
const LEAST_SHARE = 1e-3

/** What each pole, or pair of poles, of the closed loop adds to the step. */
export function Modes({ prediction: { modes } }: { readonly prediction: StepResponse }) {
  const leading = modes[0]
  if (!leading) return null
  const least = LEAST_SHARE * Math.abs(leading.amplitude)
  const shown = modes.slice(0, MOST_SHOWN).filter(({ amplitude }) => Math.abs(amplitude) >= least)
  const rings = leading.ringingFrequency > 0
  return (
    <Card title="What the poles contribute">
      <Text>
        {rings
          ? `The leading pair rings at ${figure(leading.ringingFrequency, 'Hz')} and dies away with a time constant of ${figure(leading.timeConstant, 's')}.`
          : `The leading pole dies away with a time constant of ${figure(leading.timeConstant, 's')} and does not ring.`}
      </Text>
      <Table
        label="Poles and what they contribute"
        columns={[
          { title: 'Amplitude', width: 92, isNumber: true },
          { title: 'Time constant', width: 100, isNumber: true },
          { title: 'Rings at', width: 92, isNumber: true },
        ]}
        rows={shown.map((mode, index) => ({
          key: String(index),
          cells: [
            figure(mode.amplitude, 'V'),
            figure(mode.timeConstant, 's'),
            mode.ringingFrequency > 0 ? figure(mode.ringingFrequency, 'Hz') : 'no',
          ],
        }))}
      />
      <Text variant="small" tone="quiet">
        Averaged model, largest first: the share of each in the deviation just after the step. Shares of opposite sign
        cancel at first, so that one alone may exceed the dip.
      </Text>
    </Card>
  )
}

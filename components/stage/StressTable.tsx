import { figure } from '@/components/format'
import { Card } from '@/components/ui/Card'
import { Notice } from '@/components/ui/Notice'
import { Table } from '@/components/ui/Table'
import type { OperatingPoint } from '@/converters/results'

/** Currents and voltages that the parts have to bear at this operating point. */
export function StressTable({ point }: { readonly point: OperatingPoint }) {
  const amperes = (value: number) => figure(value, 'A')
  const row = (name: string, current: { average: number; rms: number; peak: number }, volts: string) => ({
    key: name,
    cells: [name, amperes(current.average), amperes(current.rms), amperes(current.peak), volts],
  })
  return (
    <Card title="What the parts bear">
      <Table
        label="Currents and voltages of the parts"
        columns={[
          { title: 'Part', width: 74 },
          { title: 'Mean', width: 58, isNumber: true },
          { title: 'RMS', width: 58, isNumber: true },
          { title: 'Peak', width: 58, isNumber: true },
          { title: 'Voltage', width: 58, isNumber: true },
        ]}
        rows={[
          row('Inductor', point.inductorCurrent, '–'),
          row('Switch', point.switchCurrent, figure(point.switchVoltage, 'V')),
          row('Rectifier', point.rectifierCurrent, figure(point.rectifierVoltage, 'V')),
          ...point.outputCapacitorRmsCurrent.map((current, index) => ({
            key: `bank ${index}`,
            cells: [
              point.outputCapacitorRmsCurrent.length > 1 ? `Bank ${index + 1}` : 'Capacitors',
              '–',
              amperes(current),
              '–',
              '–',
            ],
          })),
        ]}
      />
      <Notice kind="note">
        Ratings are not checked: hold these against the inductor’s saturation current, the capacitors’ ripple rating and
        the semiconductors’ limits. Spikes from stray inductance come on top of the voltages.
      </Notice>
    </Card>
  )
}

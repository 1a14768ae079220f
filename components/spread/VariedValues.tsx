import { sentence } from './words'
import { Table } from '@/components/ui/Table'
import { formatQuantity } from '@/converters/quantities'
import type { VariedQuantity } from '@/converters/spread/results'

export interface VariedValuesProps {
  readonly label: string
  readonly quantities: readonly VariedQuantity[]
  /** In the order of the quantities. */
  readonly values: readonly number[]
}

/** The values that make one corner or sample, beside the nominal ones. */
export function VariedValues({ label, quantities, values }: VariedValuesProps) {
  return (
    <Table
      label={label}
      columns={[
        { title: 'Quantity', width: 128 },
        { title: 'Here', width: 86, isNumber: true },
        { title: 'Nominal', width: 86, isNumber: true },
      ]}
      rows={quantities.map(({ key, label: name, unit, nominal }, index) => ({
        key,
        cells: [sentence(name), formatQuantity(values[index] ?? nominal, unit), formatQuantity(nominal, unit)],
      }))}
    />
  )
}

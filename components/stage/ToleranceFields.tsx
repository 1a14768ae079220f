import { DraftField } from '@/components/design/DraftField'
import { Fields } from '@/components/design/Fields'
import { Text } from '@/components/ui/Text'

const PATHS = ['inductance', 'capacitance', 'esr', 'resistor', 'smallCapacitor', 'modulator', 'amplifier'] as const

/** How far the parts may lie from their values, either way. */
export function ToleranceFields() {
  return (
    <>
      <Fields>
        {PATHS.map((name) => (
          <DraftField key={name} path={`tolerances.${name}`} />
        ))}
      </Fields>
      <Text variant="small" tone="quiet">
        Either way from the value. The spread takes them to their ends.
      </Text>
    </>
  )
}

import { DraftField } from '@/components/design/DraftField'
import { Fields } from '@/components/design/Fields'
import { NetworkSchematic } from '@/components/schematic/NetworkSchematic'
import { Card } from '@/components/ui/Card'
import { Text } from '@/components/ui/Text'
import type { CompensatorPart, CompensatorType, DesignDocument } from '@/converters/document'
import { useDraft } from '@/hooks/draft/useDraft'

const PARTS: Readonly<Record<CompensatorType, readonly CompensatorPart[]>> = {
  I: ['R1', 'C1'],
  II: ['R1', 'R2', 'C1', 'C2'],
  III: ['R1', 'R2', 'C1', 'C2', 'R3', 'C3'],
}

const PLACES: Readonly<Record<CompensatorPart, string>> = {
  R1: 'R1, upper divider',
  R2: 'R2, in series with C1',
  C1: 'C1',
  C2: 'C2',
  R3: 'R3, in series with C3',
  C3: 'C3',
}

const SHUNT_PLACES: Readonly<Partial<Record<CompensatorPart, string>>> = {
  C2: 'C2, at the collector',
  R3: 'R3, across the LED resistor',
  C3: 'C3, in series with R3',
}

const NAMES: Readonly<Record<DesignDocument['amplifier']['kind'], string>> = {
  'op-amp': 'op-amp',
  transconductance: 'transconductance',
  'shunt-optocoupler': 'optocoupler',
}

/** The network as it is fitted; every part can be set by hand, and the margins follow. */
export function NetworkCard() {
  const { design } = useDraft()
  const { compensator, amplifier } = design
  if (!compensator) return null
  const isShunt = amplifier.kind === 'shunt-optocoupler'
  return (
    <Card title={`Type ${compensator.type} network, ${NAMES[amplifier.kind]}`}>
      <NetworkSchematic design={design} />
      <Fields>
        {PARTS[compensator.type].map((part) => (
          <DraftField
            key={part}
            path={part === 'R1' && !compensator.parts.R1 ? 'sense.upperResistance' : `compensator.parts.${part}`}
            label={(isShunt && SHUNT_PLACES[part]) || PLACES[part]}
          />
        ))}
      </Fields>
      <Text variant="small" tone="quiet">
        A part set by hand stays when another crossover is asked for.
      </Text>
    </Card>
  )
}

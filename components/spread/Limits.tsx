import { Fields } from '@/components/design/Fields'
import { Card } from '@/components/ui/Card'
import { Field } from '@/components/ui/Field'
import type { DesignDocument } from '@/converters/document'
import { parseQuantity, type Unit } from '@/converters/quantities'
import { formatEntry } from '@/hooks/draft/entries'
import { spreadStore, type LimitTexts } from '@/hooks/spread/keptSpread'

/** Of the output, until another deviation is entered; common practice, no source. */
const USUAL_DEVIATION = 0.05

export interface Limit {
  readonly text: string
  /** Null where no limit is set or the entry cannot be read. */
  readonly value: number | null
  readonly problem: string | undefined
}
export interface Limits {
  readonly deviation: Limit // V
  readonly recovery: Limit // s
}

export function readLimits({ deviation, recovery }: LimitTexts, design: DesignDocument): Limits {
  return {
    deviation: readLimit(
      deviation ?? formatEntry(Number((USUAL_DEVIATION * design.output.voltage).toPrecision(2)), 'V'),
      'V',
    ),
    recovery: readLimit(recovery, 's'),
  }
}

function readLimit(text: string, unit: Unit): Limit {
  if (text.trim() === '') return { text, value: null, problem: undefined }
  const entry = parseQuantity(text, unit)
  if (entry.kind === 'problem') return { text, value: null, problem: entry.message }
  return entry.value > 0
    ? { text, value: entry.value, problem: undefined }
    : { text, value: null, problem: 'Must be greater than zero.' }
}

/** What the output may do; an empty entry sets no limit. */
export function LimitFields({ limits: { deviation, recovery } }: { readonly limits: Limits }) {
  return (
    <Card title="Limits">
      <Fields>
        <Field
          label="Allowed deviation"
          value={deviation.text}
          {...(deviation.problem ? { error: deviation.problem } : { hint: 'of the mean output' })}
          onChangeText={(text) => spreadStore.limit({ deviation: text })}
        />
        <Field
          label="Recovery time"
          value={recovery.text}
          {...(recovery.problem ? { error: recovery.problem } : { hint: 'empty: no limit' })}
          onChangeText={(text) => spreadStore.limit({ recovery: text })}
        />
      </Fields>
    </Card>
  )
}

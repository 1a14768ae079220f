import { View } from 'react-native'
import { count } from './words'
import { Notice } from '@/components/ui/Notice'
import { Text } from '@/components/ui/Text'
import type { SpreadFailure } from '@/converters/spread/results'

export interface FailuresProps {
  readonly failures: readonly SpreadFailure[]
  /** What could not be computed: corners or samples. */
  readonly of: 'corners' | 'samples'
}

/** Corners or samples that have no margins, and why. */
export function Failures({ failures, of }: FailuresProps) {
  if (failures.length === 0) return null
  const all = failures.reduce((sum, failure) => sum + failure.count, 0)
  const what = all === 1 ? of.slice(0, -1) : of
  return (
    <Notice kind="fault" title={`${count(all)} ${what} could not be computed`}>
      <View role="list">
        {failures.map(({ code, message, count: times }) => (
          <View key={code + message} role="listitem">
            <Text variant="small">{`${count(times)} ×: ${message}`}</Text>
          </View>
        ))}
      </View>
    </Notice>
  )
}

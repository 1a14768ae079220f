import { View } from 'react-native'
import { ErrorState } from '@/components/ui/states'
import { Text } from '@/components/ui/Text'
import { isEntry, fieldSpec } from '@/hooks/draft/fields'
import { ApiError, fieldProblems } from '@/hooks/api'

export interface FaultProps {
  readonly error: Error
  readonly onRetry: () => void
  /** Figures are in view that belong to the last design that could be computed. */
  readonly isStale?: boolean
}

/** What went wrong with a computation, which entries it is about, and what to do. */
export function Fault({ error, onRetry, isStale }: FaultProps) {
  const problems = fieldProblems(error)
  const isAboutEntries = problems.length > 0
  const isUnreachable = error instanceof ApiError && error.failure.kind === 'unreachable'
  return (
    <ErrorState
      title={
        isAboutEntries
          ? 'This design cannot be computed as it stands'
          : isUnreachable
            ? 'No answer from the server'
            : 'The computation did not come through'
      }
      text={isAboutEntries ? 'These entries have to change:' : error.message}
      {...(isAboutEntries ? {} : { retry: { onPress: onRetry } })}
    >
      <View role="list">
        {problems.map(({ field, message }) => (
          <View key={field + message} role="listitem">
            <Text>{`${isEntry(field) ? `${fieldSpec(field).label}: ` : ''}${message}`}</Text>
          </View>
        ))}
      </View>
      {isStale ? (
        <Text variant="small">The figures below are those of the last design that could be computed.</Text>
      ) : null}
    </ErrorState>
  )
}

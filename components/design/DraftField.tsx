import { Field } from '@/components/ui/Field'
import { useEntry } from '@/hooks/draft/useDraft'
import { useServerProblems } from '@/hooks/draft/serverProblems'

export interface DraftFieldProps {
  readonly path: string
  /** Where the usual name needs more, or less, in this place. */
  readonly label?: string
  readonly hint?: string
}

/** An entry of the open design, bound to the draft. */
export function DraftField({ path, label, hint }: DraftFieldProps) {
  const { spec, text, problem, onChangeText, onFocus, onBlur } = useEntry(path)
  const refused = useServerProblems()[path]
  return (
    <Field
      label={label ?? spec.label}
      hint={hint ?? spec.hint}
      value={text}
      error={problem ?? refused}
      onChangeText={onChangeText}
      onFocus={onFocus}
      onBlur={onBlur}
    />
  )
}

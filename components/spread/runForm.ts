import { parseQuantity } from '@/converters/quantities'
import type { RunForm } from '@/hooks/spread/keptSpread'
import { SpreadRunRequest } from '@/server/contract/spreadRuns'

type ReadForm =
  | { readonly kind: 'options'; readonly options: SpreadRunRequest['options'] }
  | { readonly kind: 'problems'; readonly problems: Readonly<Record<string, string>> }

/** What was entered, as the options that it stands for, or what is wrong with it by field. */
export function readForm({ samples, seed, distribution, model }: RunForm): ReadForm {
  const problems: Record<string, string> = {}
  const whole = (name: string, text: string) => {
    const entry = parseQuantity(text, '')
    if (entry.kind === 'value') return entry.value
    problems[name] = entry.message
    return undefined
  }
  const asked = { samples: whole('samples', samples), seed: whole('seed', seed), distribution, model }
  const check = SpreadRunRequest.shape.options.safeParse(asked)
  for (const { path, message } of check.error?.issues ?? []) problems[path.join('.')] ??= message
  return check.success && Object.keys(problems).length === 0
    ? { kind: 'options', options: check.data }
    : { kind: 'problems', problems }
}

import { parseQuantity } from '@/converters/quantities'
import type { RunForm } from '@/hooks/spread/keptSpread'
import { SpreadRunRequest } from '@/server/contract/spreadRuns'

type ReadForm =
  | { readonly kind: 'options'; readonly options: SpreadRunRequest['options'] }
  | { readonly kind: 'problems'; readonly problems: Readonly<Record<string, string>> }

/** Options whose entry has a name of its own on the screen. */
const FIELDS: Readonly<Record<string, string>> = {
  'conditions.ageing.capacitanceFactor': 'capacitanceLeft',
  'conditions.ageing.esrFactor': 'esrTimes',
}

/** What was entered, as the options that it stands for, or what is wrong with it by field. */
export function readForm(form: RunForm): ReadForm {
  const { distribution, model } = form
  const problems: Record<string, string> = {}
  const read = (name: 'samples' | 'seed' | 'capacitanceLeft' | 'esrTimes', unit: '' | '%' = '') => {
    const entry = parseQuantity(form[name], unit)
    if (entry.kind === 'value') return entry.value
    problems[name] = entry.message
    return undefined
  }
  const ageing = { capacitanceFactor: read('capacitanceLeft', '%'), esrFactor: read('esrTimes') }
  const asked = { samples: read('samples'), seed: read('seed'), distribution, model, conditions: { ageing } }
  const check = SpreadRunRequest.shape.options.safeParse(asked)
  for (const { path, message } of check.error?.issues ?? [])
    problems[FIELDS[path.join('.')] ?? path.join('.')] ??= message
  return check.success && Object.keys(problems).length === 0
    ? { kind: 'options', options: check.data }
    : { kind: 'problems', problems }
}

/** The quick start's form: text as typed, read into what the server asks for. */
import type { Topology } from '@/converters/document'
import { parseQuantity, type Unit } from '@/converters/quantities'
import type { StageProposalRequestInput } from '@/server/contract/stageProposals'

/** The topologies that the quick start knows. */
export type QuickTopology = Extract<Topology, 'buck' | 'boost'>
export type Requirements = StageProposalRequestInput['requirements']

export const QUICK_FIELDS = [
  { path: 'line.minimum', label: 'Lowest line', unit: 'V' },
  { path: 'line.nominal', label: 'Nominal line', unit: 'V' },
  { path: 'line.maximum', label: 'Highest line', unit: 'V' },
  { path: 'output.voltage', label: 'Output voltage', unit: 'V' },
  { path: 'output.currentMaximum', label: 'Full load', unit: 'A' },
  { path: 'output.currentMinimum', label: 'Lightest load', unit: 'A' },
  { path: 'switchingFrequency', label: 'Switching frequency', unit: 'Hz' },
] as const satisfies readonly { path: string; label: string; unit: Unit }[]

export type QuickPath = (typeof QUICK_FIELDS)[number]['path']
export type QuickTexts = Readonly<Record<QuickPath, string>>

/** What the form begins with: a rail of the kind that each topology is chosen for. */
export const BEGINNINGS: Readonly<Record<QuickTopology, QuickTexts>> = {
  buck: {
    'line.minimum': '9 V',
    'line.nominal': '12 V',
    'line.maximum': '15 V',
    'output.voltage': '3.3 V',
    'output.currentMaximum': '8 A',
    'output.currentMinimum': '0.5 A',
    switchingFrequency: '500 kHz',
  },
  boost: {
    'line.minimum': '4.5 V',
    'line.nominal': '5 V',
    'line.maximum': '5.5 V',
    'output.voltage': '24 V',
    'output.currentMaximum': '600 mA',
    'output.currentMinimum': '50 mA',
    switchingFrequency: '350 kHz',
  },
}

export interface QuickChoices {
  readonly topology: QuickTopology
  readonly controlScheme: Requirements['controlScheme']
  readonly rectifier: 'synchronous' | 'diode'
}

export type ReadQuickStart =
  | { readonly kind: 'requirements'; readonly requirements: Requirements }
  | { readonly kind: 'problems'; readonly problems: Readonly<Partial<Record<QuickPath, string>>> }

export function readQuickStart(texts: QuickTexts, choices: QuickChoices): ReadQuickStart {
  const problems: Partial<Record<QuickPath, string>> = {}
  const values = Object.fromEntries(
    QUICK_FIELDS.map(({ path, unit }) => {
      const entry = parseQuantity(texts[path], unit)
      if (entry.kind === 'problem') problems[path] = entry.message
      return [path, entry.kind === 'value' ? entry.value : 0]
    }),
  ) as Record<QuickPath, number>
  if (Object.keys(problems).length > 0) return { kind: 'problems', problems }
  return {
    kind: 'requirements',
    requirements: {
      ...choices,
      line: { minimum: values['line.minimum'], nominal: values['line.nominal'], maximum: values['line.maximum'] },
      output: {
        voltage: values['output.voltage'],
        currentMinimum: values['output.currentMinimum'],
        currentMaximum: values['output.currentMaximum'],
      },
      switchingFrequency: values.switchingFrequency,
    },
  }
}

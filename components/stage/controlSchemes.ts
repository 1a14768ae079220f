import type { ModulatorKind } from '@/hooks/draft/edits'

export const CONTROL_SCHEMES: readonly { readonly value: ModulatorKind; readonly label: string }[] = [
  { value: 'voltage-mode', label: 'Voltage mode' },
  { value: 'peak-current-mode', label: 'Peak current mode' },
]

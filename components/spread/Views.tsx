import { useLocalSearchParams, useRouter } from 'expo-router'
import { Choice } from '@/components/ui/Choice'

const VIEWS = [
  { value: 'corners', label: 'Corners' },
  { value: 'samples', label: 'Samples' },
  { value: 'waveforms', label: 'Waveforms' },
] as const
export type View = (typeof VIEWS)[number]['value']

/** Which view of the spread the address asks for. */
export function useView(): View {
  const { show } = useLocalSearchParams<{ show?: string }>()
  return VIEWS.find(({ value }) => value === show)?.value ?? 'corners'
}

export function ViewChips() {
  const view = useView()
  const router = useRouter()
  return (
    <Choice label="View" isLabelHidden value={view} options={VIEWS} onChange={(show) => router.setParams({ show })} />
  )
}

import { figure } from '@/components/format'
import { Notice } from '@/components/ui/Notice'
import type { Root } from '@/converters/results'

/** The right-half-plane zero and what it forbids. */
export function Ceiling({ zeros }: { readonly zeros: readonly Root[] }) {
  const frequencies = zeros.filter((zero) => zero.halfPlane === 'right').map((zero) => zero.frequency)
  if (frequencies.length === 0) return null
  const lowest = Math.min(...frequencies)
  return (
    <Notice kind="caution" title={`Right-half-plane zero at ${figure(lowest, 'Hz')}`}>
      {`It takes phase while it adds gain, so no network can make up for it. Keep the crossover below a third of it, ${figure(
        lowest / 3,
        'Hz',
      )} at this operating point (common practice, no source).`}
    </Notice>
  )
}

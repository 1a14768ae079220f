import { DraftField } from '@/components/design/DraftField'
import { Fields } from '@/components/design/Fields'

export function TargetFields() {
  return (
    <Fields>
      <DraftField path="targets.crossover" />
      <DraftField path="targets.phaseMargin" />
      <DraftField path="targets.gainMargin" />
    </Fields>
  )
}

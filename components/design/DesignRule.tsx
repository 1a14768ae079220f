import { StyleSheet, View } from 'react-native'
import { ROLE_NAMES } from '@/components/roots'
import { FrequencyRule } from '@/components/plots/FrequencyRule'
import { space } from '@/constants/theme'
import type { Root } from '@/converters/results'
import { draftStore } from '@/hooks/draft/store'
import { useDraft } from '@/hooks/draft/useDraft'
import { useDesignAnalysis } from '@/hooks/useDesignAnalysis'
import { useLayout } from '@/hooks/useLayout'
import { useProposals } from '@/hooks/useProposals'
import { useTheme } from '@/hooks/useTheme'

const NONE = { poles: [], zeros: [] }

/** The frequency rule with what is known of the open design. */
export function DesignRule() {
  const theme = useTheme()
  const { isWide } = useLayout()
  const { design, awaitsProposal } = useDraft()
  const { analysis } = useDesignAnalysis()
  const { data: proposals } = useProposals()
  const loop = design.compensator ? analysis?.loop : null
  return (
    <View style={[styles.frame, { borderBottomColor: theme.rule, paddingHorizontal: isWide ? space.lg : 0 }]}>
      <FrequencyRule
        switchingFrequency={design.switchingFrequency}
        plant={analysis ? named(analysis.plant.poles, analysis.plant.zeros) : NONE}
        network={loop ? named(loop.compensatorPoles, loop.compensatorZeros) : NONE}
        window={proposals?.window ?? null}
        // While a network for another crossover is being looked for, the handle stays where it was let go.
        crossover={loop && !awaitsProposal ? (analysis?.margins?.crossover ?? null) : null}
        wanted={design.targets.crossover ?? proposals?.suggestion?.crossover ?? null}
        onWant={draftStore.wantCrossover}
      />
    </View>
  )
}

function named(poles: readonly Root[], zeros: readonly Root[]) {
  const withName = (root: Root) => ({ ...root, name: ROLE_NAMES[root.role] })
  return { poles: poles.map(withName), zeros: zeros.map(withName) }
}

const styles = StyleSheet.create({ frame: { borderBottomWidth: 1, paddingTop: space.xs } })

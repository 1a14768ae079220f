import { useState } from 'react'
import { StyleSheet, View } from 'react-native'
import { FrequencyRule } from '@/components/plots/FrequencyRule'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { useTheme } from '@/hooks/useTheme'

// A drawing of what the rule shows, of the kind that a 12 V to 3.3 V buck gives; not the result of a computation.
const PLANT = {
  poles: [
    { frequency: 7_800, halfPlane: 'left' as const },
    { frequency: 7_800, halfPlane: 'left' as const },
  ],
  zeros: [{ frequency: 210_000, halfPlane: 'left' as const }],
}
const NETWORK = {
  poles: [
    { frequency: 190_000, halfPlane: 'left' as const },
    { frequency: 260_000, halfPlane: 'left' as const },
  ],
  zeros: [
    { frequency: 5_200, halfPlane: 'left' as const },
    { frequency: 9_400, halfPlane: 'left' as const },
  ],
}
const WINDOW = { lower: 15_000, upper: 100_000 }

/** The product's picture on the first page: the handle can be tried at once. */
export function HeroRule() {
  const theme = useTheme()
  const [wanted, setWanted] = useState(45_000)
  return (
    <View style={[styles.card, { backgroundColor: theme.sheet, borderColor: theme.rule }]}>
      <FrequencyRule
        switchingFrequency={500_000}
        plant={PLANT}
        network={NETWORK}
        window={WINDOW}
        crossover={null}
        wanted={wanted}
        onWant={setWanted}
      />
      <Text variant="small" tone="quiet">
        The frequency rule: the stage’s poles × and zeros ○ above, the network’s below, the room that the crossover has,
        and the crossover as a handle. An example, with round figures.
      </Text>
    </View>
  )
}

const styles = StyleSheet.create({ card: { borderWidth: 1, borderRadius: 8, padding: space.md, gap: space.sm } })

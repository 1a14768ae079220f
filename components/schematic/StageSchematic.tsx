import { useState } from 'react'
import { Pressable, ScrollView, StyleSheet, View } from 'react-native'
import Svg, { G } from 'react-native-svg'
import { ControlDrawing } from './ControlDrawing'
import { PowerDrawing } from './PowerDrawing'
import { hitBoxes } from './hitBoxes'
import type { StagePart } from './stageParts'
import { stageLayout } from './stageLayout'
import { TARGET } from '@/constants/theme'
import type { DesignDocument } from '@/converters/document'
import { useTheme } from '@/hooks/useTheme'

export interface StageSchematicProps {
  readonly design: DesignDocument
  readonly onPart: (part: StagePart) => void
}

/** The power stage as entered, with its values; each part opens its entries. */
export function StageSchematic({ design, onPart }: StageSchematicProps) {
  const theme = useTheme()
  const [available, setAvailable] = useState(0)
  const layout = stageLayout(available, design)
  const isWider = layout.width > available
  return (
    <View onLayout={(event) => setAvailable(Math.floor(event.nativeEvent.layout.width))} style={styles.frame}>
      {available === 0 ? null : (
        <ScrollView
          horizontal
          scrollEnabled={isWider}
          contentContainerStyle={[styles.middle, { minWidth: available }]}
          role="group"
          aria-label="Schematic of the power stage"
        >
          <View style={{ width: layout.width, height: layout.height }}>
            <Svg width={layout.width} height={layout.height} aria-hidden>
              <G>
                <PowerDrawing
                  design={design}
                  layout={layout}
                  color={theme.ink}
                  ground={theme.sheet}
                  valueColor={theme.gain}
                />
                <ControlDrawing
                  design={design}
                  layout={layout}
                  color={theme.ink}
                  ground={theme.sheet}
                  valueColor={theme.gain}
                />
              </G>
            </Svg>
            {hitBoxes(design, layout).map(({ key, part, label, x, y, width, height }) => (
              <Pressable
                key={key}
                role="button"
                aria-label={`${label}. Change`}
                onPress={() => onPart(part)}
                style={[
                  styles.hit,
                  { left: x, top: y, width: Math.max(TARGET, width), height: Math.max(TARGET, height) },
                ]}
              />
            ))}
          </View>
        </ScrollView>
      )}
    </View>
  )
}

const styles = StyleSheet.create({
  frame: { minHeight: 314 },
  middle: { justifyContent: 'center' },
  hit: { position: 'absolute', borderRadius: 6 },
})

import { useMemo, useState } from 'react'
import { StyleSheet, View } from 'react-native'
import { BodeDrawing } from './BodeDrawing'
import { interpolate, LEFT, RIGHT, type BodeCurve, type BodePlotProps, type GainScale } from './bode'
import { PlotFrame, type PlotTable } from './PlotFrame'
import { capturePointer, readSideways } from './pointer'
import { afterKey } from './rule'
import { decibels, degrees, figure } from '@/components/format'
import { onKey } from '@/components/ui/keys'
import { Text } from '@/components/ui/Text'
import { space } from '@/constants/theme'
import { formatQuantity } from '@/converters/quantities'

/** Gain and phase over frequency, with a cursor that reads every curve at one frequency. */
export function BodePlot(props: BodePlotProps) {
  const { title, frequencies, curves, crossover = null, height = 420, gainScale = 'dB' } = props
  const [asked, setAsked] = useState<number | null>(null)
  const low = frequencies[0] ?? 10
  const high = frequencies.at(-1) ?? 1e6
  const cursor = Math.min(high, Math.max(low, asked ?? crossover?.frequency ?? Math.sqrt(low * high)))
  const readings = useMemo(
    () => curves.map((curve) => ({ curve, text: reading(curve, frequencies, cursor, gainScale) })),
    [curves, frequencies, cursor, gainScale],
  )
  const move = (frequency: number) => setAsked(Math.min(high, Math.max(low, frequency)))
  return (
    <PlotFrame
      title={title}
      fileName={props.fileName}
      summary={props.summary}
      table={() => tableOf(frequencies, curves, gainScale)}
      reading={
        <View style={styles.reading}>
          <Text variant="smallValue" style={styles.at}>
            {figure(cursor, 'Hz')}
          </Text>
          {readings.map(({ curve, text }) => (
            <View key={curve.key} style={styles.pair}>
              <Text variant="label" tone="quiet">
                {curve.label}
              </Text>
              <Text variant="smallValue">{text}</Text>
            </View>
          ))}
        </View>
      }
    >
      {(width) => {
        const ratio = Math.log(high / low) / (width - LEFT - RIGHT)
        const frequencyAt = (x: number) => low * Math.exp((x - LEFT) * ratio)
        return (
          <View>
            <BodeDrawing {...props} width={width} height={height} cursor={asked === null ? null : cursor} />
            <View
              role="slider"
              aria-label={`${title}: cursor`}
              aria-valuemin={low}
              aria-valuemax={high}
              aria-valuenow={cursor}
              aria-valuetext={`${figure(cursor, 'Hz')}: ${readings.map(({ curve, text }) => `${curve.label} ${text}`).join('; ')}`}
              tabIndex={0}
              style={[StyleSheet.absoluteFill, readSideways]}
              {...onKey((key) => {
                const next = afterKey(key, cursor, low, high)
                if (next !== null) move(next)
                return next !== null
              })}
              onPointerDown={(event) => {
                capturePointer(event)
                move(frequencyAt(event.nativeEvent.offsetX))
              }}
              onPointerMove={(event) => {
                if (event.nativeEvent.buttons !== 0) move(frequencyAt(event.nativeEvent.offsetX))
              }}
            />
          </View>
        )
      }}
    </PlotFrame>
  )
}

function gainText(gainDb: number, scale: GainScale): string {
  return scale === 'Ω' ? formatQuantity(10 ** (gainDb / 20), 'Ω') : decibels(gainDb)
}

function reading(curve: BodeCurve, frequencies: readonly number[], cursor: number, scale: GainScale): string {
  const at = interpolate(curve, frequencies, cursor)
  return at ? `${gainText(at.gainDb, scale)}  ${degrees(at.phaseDeg)}` : '–'
}

const ROWS_PER_DECADE = 8

function tableOf(frequencies: readonly number[], curves: readonly BodeCurve[], scale: GainScale): PlotTable {
  const unit = scale === 'Ω' ? 'Ω' : 'dB'
  const header = ['Hz', ...curves.flatMap((curve) => [`${curve.label}, ${unit}`, `${curve.label}, °`])]
  const gainOf = (gainDb: number) => (scale === 'Ω' ? 10 ** (gainDb / 20) : gainDb)
  const decades = Math.log10((frequencies.at(-1) ?? 1) / (frequencies[0] ?? 1))
  const stride = Math.max(1, Math.round(frequencies.length / Math.max(1, decades * ROWS_PER_DECADE)))
  const rows = frequencies.flatMap((frequency, index) => {
    if (index % stride !== 0) return []
    const cells = curves.flatMap(({ response }) => {
      const point = response[index]
      return point ? [gainText(point.gainDb, scale), degrees(point.phaseDeg)] : ['–', '–']
    })
    return [[figure(frequency, 'Hz'), ...cells]]
  })
  const data = frequencies.map((frequency, index) => [
    frequency,
    ...curves.flatMap(({ response }) => {
      const point = response[index]
      return point ? [gainOf(point.gainDb), point.phaseDeg] : [null, null]
    }),
  ])
  return { header, rows, data }
}

const styles = StyleSheet.create({
  reading: { flexDirection: 'row', flexWrap: 'wrap', columnGap: space.lg, minHeight: 20, alignItems: 'baseline' },
  at: { minWidth: 76 },
  pair: { flexDirection: 'row', gap: 6, alignItems: 'baseline' },
})

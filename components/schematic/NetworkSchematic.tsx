import { useState } from 'react'
import { StyleSheet, View } from 'react-native'
import Svg, { G, Path } from 'react-native-svg'
import { Lines } from './Lines'
import { NetworkPart, partText, type Ink, type NetworkParts } from './NetworkPart'
import { SHUNT_HEIGHT, ShuntNetwork } from './ShuntNetwork'
import { Capacitor, Earth, Junction, Resistor, STROKE, Wire } from './symbols'
import { PlotText } from '@/components/plots/PlotText'
import type { CompensatorPart, DesignDocument } from '@/converters/document'
import { formatEntry } from '@/hooks/draft/entries'
import { useTheme } from '@/hooks/useTheme'

const WIDTH = 308
const HEIGHT = 262

export interface NetworkSchematicProps {
  readonly design: DesignDocument
}

/** The error amplifier with its network, as entered. */
export function NetworkSchematic({ design }: NetworkSchematicProps) {
  const [width, setWidth] = useState(0)
  const theme = useTheme()
  const { compensator, amplifier, sense, output } = design
  if (!compensator) return null
  const parts: NetworkParts = { ...compensator.parts, R1: compensator.parts.R1 ?? sense.upperResistance }
  const lower = lowerResistance(parts.R1 ?? 0, sense.referenceVoltage, output.voltage)
  const ink: Ink = { color: theme.ink, ground: theme.sheet, value: theme.accent }
  const height = amplifier.kind === 'shunt-optocoupler' ? SHUNT_HEIGHT : HEIGHT
  const left = Math.max(0, (width - WIDTH) / 2)
  const shared = { parts, hasLead: compensator.type === 'III', ink }
  return (
    <View
      role="img"
      aria-label={`Type ${compensator.type} network: ${listed(parts)}`}
      style={[styles.frame, { minHeight: height }]}
      onLayout={(event) => setWidth(event.nativeEvent.layout.width)}
    >
      {width === 0 ? null : (
        <Svg width={Math.max(WIDTH, width)} height={height} aria-hidden>
          <G transform={`translate(${left} 0)`}>
            {amplifier.kind === 'shunt-optocoupler' ? (
              <ShuntNetwork {...shared} amplifier={amplifier} reference={sense.referenceVoltage} lower={lower} />
            ) : (
              <>
                <Divider {...shared} lower={lower} />
                <Amplifier
                  reference={formatEntry(sense.referenceVoltage, 'V')}
                  isCurrent={amplifier.kind === 'transconductance'}
                  ink={ink}
                />
                {amplifier.kind === 'op-amp' ? (
                  <Feedback {...shared} isTypeI={compensator.type === 'I'} />
                ) : (
                  <Shunt {...shared} isTypeI={compensator.type === 'I'} />
                )}
              </>
            )}
          </G>
        </Svg>
      )}
    </View>
  )
}

/** The divider's lower resistor, R₁·V_ref/(V − V_ref); null where the output is the reference itself. */
function lowerResistance(upper: number, reference: number, output: number): number | null {
  return output > reference ? (upper * reference) / (output - reference) : null
}

function listed(parts: NetworkParts): string {
  return Object.entries(parts)
    .filter(([, value]) => value)
    .map(([name, value]) => `${name} ${value ? partText(name as CompensatorPart, value) : ''}`)
    .join(', ')
}

interface NetworkProps {
  readonly parts: NetworkParts
  readonly hasLead: boolean
  readonly ink: Ink
}

const NODE = { x: 104, y: 158 }
const INPUT = 142 // where the amplifier's inputs stand
const OUT = { x: 188, y: 172 }

/** From the output to the amplifier's inverting input. */
function Divider({ parts, hasLead, lower, ink }: NetworkProps & { readonly lower: number | null }) {
  return (
    <G>
      <Wire color={ink.color} d={`M8 ${NODE.y}H${INPUT}`} />
      <PlotText x={2} y={NODE.y + 18} color={ink.color}>
        output
      </PlotText>
      <NetworkPart name="R1" parts={parts} x={62} y={NODE.y} ink={ink} side="below" />
      {hasLead ? (
        <>
          <Wire color={ink.color} d={`M22 ${NODE.y}V92H${NODE.x}V${NODE.y}`} />
          <NetworkPart name="R3" parts={parts} x={44} y={92} ink={ink} />
          <NetworkPart name="C3" parts={parts} x={86} y={92} ink={ink} />
          <Junction x={22} y={NODE.y} color={ink.color} />
        </>
      ) : null}
      <Junction x={NODE.x} y={NODE.y} color={ink.color} />
      {lower === null ? null : (
        <>
          <Wire color={ink.color} d={`M${NODE.x} ${NODE.y}V238`} />
          <Resistor x={NODE.x} y={206} isVertical color={ink.color} ground={ink.ground} />
          <PlotText x={NODE.x - 12} y={212} color={ink.color} anchor="end">
            lower
          </PlotText>
          <PlotText x={NODE.x - 12} y={228} color={ink.color} anchor="end">
            {formatEntry(Number(lower.toPrecision(3)), 'Ω')}
          </PlotText>
          <Earth x={NODE.x} y={238} color={ink.color} />
        </>
      )}
    </G>
  )
}

function Amplifier({
  reference,
  isCurrent,
  ink,
}: {
  readonly reference: string
  readonly isCurrent: boolean
  readonly ink: Ink
}) {
  return (
    <G>
      <Path d={`M${INPUT} 146V198L${OUT.x} ${OUT.y}z`} stroke={ink.color} strokeWidth={STROKE} fill={ink.ground} />
      <PlotText x={INPUT + 4} y={163} color={ink.color}>
        −
      </PlotText>
      <PlotText x={INPUT + 4} y={191} color={ink.color}>
        +
      </PlotText>
      {isCurrent ? (
        <PlotText x={INPUT + 14} y={177} color={ink.color}>
          gm
        </PlotText>
      ) : null}
      <Wire color={ink.color} d={`M${INPUT} 186H130V208`} />
      <PlotText x={118} y={224} color={ink.value} isStrong>
        {reference}
      </PlotText>
    </G>
  )
}

/** Op-amp: from the amplifier's output back to its inverting input. */
function Feedback({ parts, ink, isTypeI }: NetworkProps & { readonly isTypeI: boolean }) {
  const right = 264
  const left = 124
  return (
    <G>
      <Wire color={ink.color} d={`M${OUT.x} ${OUT.y}H${right + 14}`} />
      <PlotText x={right + 20} y={OUT.y + 20} color={ink.color} anchor="end">
        control
      </PlotText>
      <Wire color={ink.color} d={`M${left} ${NODE.y}V106H${right}V${OUT.y}`} />
      <Junction x={left} y={NODE.y} color={ink.color} />
      <Junction x={right} y={OUT.y} color={ink.color} />
      {isTypeI ? (
        <NetworkPart name="C1" parts={parts} x={194} y={106} ink={ink} />
      ) : (
        <>
          <NetworkPart name="R2" parts={parts} x={160} y={106} ink={ink} />
          <NetworkPart name="C1" parts={parts} x={228} y={106} ink={ink} />
          <Wire color={ink.color} d={`M${left} 106V44H${right}V106`} isDashed={!parts.C2} />
          <NetworkPart name="C2" parts={parts} x={194} y={44} ink={ink} />
          <Junction x={left} y={106} color={ink.color} />
          <Junction x={right} y={106} color={ink.color} />
        </>
      )}
    </G>
  )
}

/** Transconductance amplifier: from its output to ground. */
function Shunt({ parts, ink, isTypeI }: NetworkProps & { readonly isTypeI: boolean }) {
  const first = 206
  const second = 282
  const top = 40
  return (
    <G>
      <Wire color={ink.color} d={`M${OUT.x} ${OUT.y}V${top}H${second + 16}`} />
      <PlotText x={second + 18} y={top - 8} color={ink.color} anchor="end">
        control
      </PlotText>
      <Wire color={ink.color} d={`M${first} ${top}V232`} />
      <Junction x={first} y={top} color={ink.color} />
      <Earth x={first} y={232} color={ink.color} />
      {isTypeI ? (
        <NetworkPart name="C1" parts={parts} x={first} y={120} ink={ink} isVertical side="right" />
      ) : (
        <>
          <NetworkPart name="R2" parts={parts} x={first} y={96} ink={ink} isVertical side="right" />
          <NetworkPart name="C1" parts={parts} x={first} y={196} ink={ink} isVertical side="right" />
          <Wire color={ink.color} d={`M${second} ${top}V150`} isDashed={!parts.C2} />
          <Junction x={second} y={top} color={ink.color} />
          <Capacitor x={second} y={112} isVertical color={ink.color} ground={ink.ground} />
          <Earth x={second} y={150} color={ink.color} />
          <Lines
            x={second}
            y={182}
            lines={['C2', parts.C2 ? partText('C2', parts.C2) : 'not fitted']}
            color={ink.value}
            isCentred
          />
        </>
      )}
    </G>
  )
}

const styles = StyleSheet.create({ frame: { overflow: 'hidden' } })

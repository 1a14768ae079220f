import { G, Path } from 'react-native-svg'
import { Lines } from './Lines'
import { NetworkPart, partText, type Ink, type NetworkParts } from './NetworkPart'
import { Arrow, Capacitor, Diode, Earth, Junction, Resistor, STROKE, Wire } from './symbols'
import { PlotText } from '@/components/plots/PlotText'
import type { DesignDocument } from '@/converters/document'
import { formatEntry } from '@/hooks/draft/entries'

export const SHUNT_HEIGHT = 284

const RAIL = 28
const DIVIDER = 26
const LED = { x: 128, y: 110 }
const LEAD = 170
const CATHODE = 170
const REFERENCE = 204
const COLLECTOR = { x: 258, y: 88 }
const SHUNT_C2 = 294

export interface ShuntNetworkProps {
  readonly amplifier: Extract<DesignDocument['amplifier'], { kind: 'shunt-optocoupler' }>
  readonly parts: NetworkParts
  readonly hasLead: boolean
  /** V, and Ω of the divider's lower resistor (null where there is none). */
  readonly reference: number
  readonly lower: number | null
  readonly ink: Ink
}

/** Shunt reference on the output's side, LED from the output itself, transistor with its pull-up on the control's side. */
export function ShuntNetwork({ amplifier, parts, hasLead, reference, lower, ink }: ShuntNetworkProps) {
  const { color, ground, value } = ink
  const line = { color, ground }
  return (
    <G>
      <PlotText x={2} y={RAIL - 10} color={color}>
        output
      </PlotText>
      <Wire
        color={color}
        d={`M8 ${RAIL}H${hasLead ? LEAD : LED.x}M${DIVIDER} ${RAIL}V${lower === null ? REFERENCE : 252}`}
      />
      <Junction x={DIVIDER} y={RAIL} color={color} />
      <NetworkPart name="R1" parts={parts} x={DIVIDER} y={104} ink={ink} isVertical side="right" />
      {lower === null ? null : (
        <>
          <Resistor x={DIVIDER} y={230} isVertical {...line} />
          <Lines
            x={DIVIDER + 15}
            y={236}
            lines={['lower', formatEntry(Number(lower.toPrecision(3)), 'Ω')]}
            color={color}
          />
          <Earth x={DIVIDER} y={252} color={color} />
        </>
      )}

      <Wire color={color} d={`M${LED.x} ${RAIL}V226`} />
      <Resistor x={LED.x} y={58} isVertical {...line} />
      <Lines x={LED.x - 12} y={58} lines={[formatEntry(amplifier.ledResistance, 'Ω')]} color={value} endsHere />
      <Diode x={LED.x} y={LED.y} isVertical {...line} />
      <LightRays color={color} />
      {hasLead ? (
        <>
          <Wire color={color} d={`M${LEAD} ${RAIL}V88H${LED.x}`} />
          <NetworkPart name="R3" parts={parts} x={LEAD} y={47} ink={ink} isVertical side="beside" />
          <NetworkPart name="C3" parts={parts} x={LEAD} y={76} ink={ink} isVertical side="beside" />
          <Junction x={LED.x} y={RAIL} color={color} />
          <Junction x={LED.x} y={88} color={color} />
        </>
      ) : null}

      <Wire color={color} d={`M${LED.x} ${CATHODE}H42V${REFERENCE}M${DIVIDER} ${REFERENCE}H${LED.x - 9}`} />
      <Junction x={LED.x} y={CATHODE} color={color} />
      <Junction x={42} y={REFERENCE} color={color} />
      <Junction x={DIVIDER} y={REFERENCE} color={color} />
      {parts.R2 ? (
        <>
          <NetworkPart name="R2" parts={parts} x={106} y={CATHODE} ink={ink} />
          <NetworkPart name="C1" parts={parts} x={64} y={CATHODE} ink={ink} />
        </>
      ) : (
        <NetworkPart name="C1" parts={parts} x={84} y={CATHODE} ink={ink} />
      )}
      <ShuntReference ink={ink} reference={reference} />

      <Collector amplifier={amplifier} parts={parts} ink={ink} />
    </G>
  )
}

function LightRays({ color }: { readonly color: string }) {
  return [104, 114].map((y) => (
    <G key={y}>
      <Wire color={color} d={`M${LED.x + 16} ${y}h14`} />
      <Path d={`M${LED.x + 36} ${y}l-7 -3.5v7z`} fill={color} />
    </G>
  ))
}

/** A Z diode whose voltage its third terminal sets. */
function ShuntReference({ ink, reference }: { readonly ink: Ink; readonly reference: number }) {
  return (
    <G>
      <Path
        d={`M${LED.x - 8} ${REFERENCE + 8}H${LED.x + 8}L${LED.x} ${REFERENCE - 8}z`}
        stroke={ink.color}
        strokeWidth={STROKE}
        fill={ink.ground}
        strokeLinejoin="round"
      />
      <Wire color={ink.color} d={`M${LED.x - 12} ${REFERENCE - 12}l4 4H${LED.x + 8}l4 4`} />
      <Wire color={ink.color} d={`M${LED.x - 20} ${REFERENCE}H${LED.x - 4}`} />
      <Earth x={LED.x} y={226} color={ink.color} />
      <PlotText x={LED.x + 17} y={REFERENCE + 5} color={ink.value} isStrong>
        {formatEntry(reference, 'V')}
      </PlotText>
    </G>
  )
}

function Collector({ amplifier, parts, ink }: Pick<ShuntNetworkProps, 'amplifier' | 'parts' | 'ink'>) {
  const { x, y } = COLLECTOR
  const line = { color: ink.color, ground: ink.ground }
  return (
    <G>
      <PlotText x={x} y={RAIL - 10} color={ink.color} anchor="middle">
        supply
      </PlotText>
      <Wire color={ink.color} d={`M${x - 9} ${RAIL}h18M${x} ${RAIL}V96l-9 8M${x - 9} 116l9 8V146M${x - 9} 99v22`} />
      <Arrow x={x - 1} y={123} to="down" color={ink.color} />
      <Resistor x={x} y={56} isVertical {...line} />
      <Lines x={x + 11} y={56} lines={[formatEntry(amplifier.pullUpResistance, 'Ω')]} color={ink.value} />
      <Junction x={x} y={y} color={ink.color} />
      <Earth x={x} y={146} color={ink.color} />
      <Lines
        x={x - 20}
        y={134}
        lines={[`CTR ${formatEntry(amplifier.currentTransferRatio, '%')}`]}
        color={ink.value}
        endsHere
      />
      <Wire color={ink.color} d={`M${x} ${y}H304`} />
      <PlotText x={306} y={y - 6} color={ink.color} anchor="end">
        control
      </PlotText>
      <Wire color={ink.color} d={`M${SHUNT_C2} ${y}V146`} isDashed={!parts.C2} />
      <Junction x={SHUNT_C2} y={y} color={ink.color} />
      <Capacitor x={SHUNT_C2} y={120} isVertical {...line} />
      <Earth x={SHUNT_C2} y={146} color={ink.color} />
      <Lines
        x={282}
        y={186}
        lines={['C2', parts.C2 ? partText('C2', parts.C2) : 'not fitted']}
        color={ink.value}
        isCentred
      />
    </G>
  )
}

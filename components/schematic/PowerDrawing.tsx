import { G } from 'react-native-svg'
import type { StageLayout } from './stageLayout'
import { partValues } from './stageParts'
import {
  Arrow,
  Capacitor,
  CurrentSource,
  Diode,
  Earth,
  HALF,
  Inductor,
  Junction,
  Resistor,
  Transistor,
  VoltageSource,
  Wire,
} from './symbols'
import { PlotText } from '@/components/plots/PlotText'
import type { DesignDocument } from '@/converters/document'

export interface DrawingProps {
  readonly design: DesignDocument
  readonly layout: StageLayout
  readonly color: string
  readonly ground: string
  readonly valueColor: string
}

/** Line, switch, rectifier, inductor, capacitors and load. */
export function PowerDrawing({ design, layout, color, ground, valueColor }: DrawingProps) {
  const { top, bottom, source, node, beforeNode, afterNode, banks, load } = layout
  const values = partValues(design)
  const middle = (top + bottom) / 2
  const ink = { color, ground }
  const isBoost = design.topology === 'boost'
  const beside = (x: number, lines: readonly string[], y = middle) => (
    <Lines x={x} y={y} lines={lines} color={valueColor} />
  )
  const above = (x: number, lines: readonly string[]) => (
    <Lines x={x} y={top - 26} lines={lines} color={valueColor} isCentred />
  )
  return (
    <G>
      <Wire color={color} d={`M${source} ${top}H${load}V${bottom}H${source}V${top}`} />
      <Wire color={color} d={`M${node} ${top}V${bottom}`} />
      {[node, ...banks].map((x) => (
        <G key={x}>
          <Junction x={x} y={top} color={color} />
          <Junction x={x} y={bottom} color={color} />
        </G>
      ))}
      <Earth x={source} y={bottom} color={color} />
      <VoltageSource x={source} y={middle} isVertical {...ink} />
      <PlotText x={source + 6} y={middle - 18} color={color}>
        +
      </PlotText>
      {beside(source + 18, values.line)}

      {isBoost ? (
        <>
          <Inductor x={beforeNode} y={top} {...ink} />
          {above(beforeNode, values.inductor)}
          <Transistor x={node} y={middle} isVertical {...ink} />
          {beside(node + 10, values.switch)}
          <Rectifier design={design} x={afterNode} y={top} {...ink} />
          {above(afterNode, values.rectifier)}
        </>
      ) : (
        <>
          <Transistor x={beforeNode} y={top} {...ink} />
          {above(beforeNode, values.switch)}
          <Rectifier design={design} x={node} y={middle} isVertical isUpwards {...ink} />
          {beside(node + 14, values.rectifier)}
          <Inductor x={afterNode} y={top} {...ink} />
          {above(afterNode, values.inductor)}
        </>
      )}

      {banks.map((x, index) => (
        <G key={index}>
          <Bank x={x} top={top} bottom={bottom} hasEsr={(design.outputCapacitors[index]?.esr ?? 0) > 0} {...ink} />
          {beside(x + 15, values.banks[index]?.pieces ?? [], middle - 22)}
          {beside(x + 12, [values.banks[index]?.esr ?? ''], middle + 24)}
        </G>
      ))}
      <Load kind={design.load} x={load} y={middle} {...ink} />
      {beside(load + 14, values.load)}
    </G>
  )
}

interface RectifierProps {
  readonly design: DesignDocument
  readonly x: number
  readonly y: number
  readonly isVertical?: boolean
  readonly isUpwards?: boolean
  readonly color: string
  readonly ground: string
}

/** A diode, or the transistor that takes its place. */
function Rectifier({ design, isUpwards, ...at }: RectifierProps) {
  if (design.rectifier.kind === 'synchronous') return <Transistor {...at} />
  return (
    <G transform={`rotate(${isUpwards ? 180 : 0} ${at.x} ${at.y})`}>
      <Diode {...at} />
    </G>
  )
}

interface BankProps {
  readonly x: number
  readonly top: number
  readonly bottom: number
  readonly hasEsr: boolean
  readonly color: string
  readonly ground: string
}

function Bank({ x, top, bottom, hasEsr, color, ground }: BankProps) {
  const middle = (top + bottom) / 2
  return (
    <G>
      <Wire color={color} d={`M${x} ${top}V${bottom}`} />
      <Capacitor x={x} y={hasEsr ? middle - 20 : middle} isVertical color={color} ground={ground} />
      {hasEsr ? <Resistor x={x} y={middle + 22} isVertical color={color} ground={ground} /> : null}
    </G>
  )
}

function Load({
  kind,
  x,
  y,
  color,
  ground,
}: {
  kind: DesignDocument['load']
  x: number
  y: number
  color: string
  ground: string
}) {
  if (kind === 'constant-current') {
    return (
      <G>
        <CurrentSource x={x} y={y} isVertical color={color} ground={ground} />
        <Arrow x={x} y={y + HALF.source + 9} to="down" color={color} />
      </G>
    )
  }
  return (
    <G>
      <Resistor x={x} y={y} isVertical color={color} ground={ground} />
      {kind === 'constant-power' ? (
        <PlotText x={x} y={y + 5} color={color} anchor="middle" isStrong>
          P
        </PlotText>
      ) : null}
    </G>
  )
}

interface LinesProps {
  readonly x: number
  readonly y: number
  readonly lines: readonly string[]
  readonly color: string
  readonly isCentred?: boolean
}

/** Lines of lettering about a height. */
export function Lines({ x, y, lines, color, isCentred }: LinesProps) {
  const first = y - ((lines.length - 1) * 16) / 2 + 4.5
  return lines.map((line, index) => (
    <PlotText key={index} x={x} y={first + index * 16} color={color} anchor={isCentred ? 'middle' : 'start'} isStrong>
      {line}
    </PlotText>
  ))
}

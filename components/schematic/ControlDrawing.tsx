import { G, Rect } from 'react-native-svg'
import { Lines } from './Lines'
import type { DrawingProps } from './PowerDrawing'
import { partValues } from './stageParts'
import { Arrow, Junction, STROKE, Wire } from './symbols'
import { PlotText } from '@/components/plots/PlotText'

/** Error amplifier and modulator: the way back from the output to the switch. */
export function ControlDrawing({ design, layout, color, ground, valueColor }: DrawingProps) {
  const { control, top, gate, load, width } = layout
  const values = partValues(design)
  const middle = (control.top + control.bottom) / 2
  const out = width - 4
  const modulatorWidth = control.middle - control.left - 14
  const amplifierLeft = control.middle + 14
  const block = { top: control.top, height: control.bottom - control.top, color, ground, valueColor }
  return (
    <G>
      <Wire color={color} d={`M${gate.x} ${gate.y}V${control.top}`} />
      <Arrow x={gate.x} y={gate.y + 1} to="up" color={color} />
      <Wire color={color} d={`M${load} ${top}H${out}V${middle}H${control.right}`} />
      <Junction x={load} y={top} color={color} />
      <Arrow x={control.right} y={middle} to="left" color={color} />
      <Wire color={color} d={`M${amplifierLeft} ${middle}H${control.left + modulatorWidth}`} />
      <Arrow x={control.left + modulatorWidth} y={middle} to="left" color={color} />
      <Block {...block} x={control.left} width={modulatorWidth} name="Modulator" lines={values.modulator} />
      <Block
        {...block}
        x={amplifierLeft}
        width={control.right - amplifierLeft}
        name="Error amplifier"
        lines={values.amplifier}
      />
    </G>
  )
}

interface BlockProps {
  readonly x: number
  readonly top: number
  readonly width: number
  readonly height: number
  readonly name: string
  readonly lines: readonly string[]
  readonly color: string
  readonly ground: string
  readonly valueColor: string
}

function Block({ x, top, width, height, name, lines, color, ground, valueColor }: BlockProps) {
  return (
    <G>
      <Rect x={x} y={top} width={width} height={height} stroke={color} strokeWidth={STROKE} fill={ground} />
      <PlotText x={x + width / 2} y={top + 16} color={color} anchor="middle">
        {name}
      </PlotText>
      <Lines x={x + width / 2} y={top + 39} lines={lines} color={valueColor} isCentred />
    </G>
  )
}

import Svg, { G } from 'react-native-svg'
import { Capacitor, Diode, Inductor, Junction, Transistor, Wire } from '@/components/schematic/symbols'
import type { DrawnTopology } from '@/components/schematic/stageLayout'

const WIDTH = 200
const HEIGHT = 92
const TOP = 34
const BOTTOM = 80

/** The bare circuit, for a card. */
export function TopologyGlyph({
  topology,
  color,
  ground,
}: {
  readonly topology: DrawnTopology
  readonly color: string
  readonly ground: string
}) {
  const ink = { color, ground }
  return (
    <Svg width={WIDTH} height={HEIGHT} aria-hidden>
      <G>
        <Wire color={color} d={`M10 ${TOP}H190M10 ${BOTTOM}H190M${NODE} ${TOP}V${BOTTOM}M${OUT} ${TOP}V${BOTTOM}`} />
        <Capacitor x={OUT} y={57} isVertical {...ink} />
        {topology === 'buck' ? (
          <>
            <Transistor x={46} y={TOP} {...ink} />
            <G transform={`rotate(180 ${NODE} 57)`}>
              <Diode x={NODE} y={57} isVertical {...ink} />
            </G>
            <Inductor x={122} y={TOP} {...ink} />
          </>
        ) : (
          <>
            <Inductor x={46} y={TOP} {...ink} />
            <Transistor x={NODE} y={57} isVertical {...ink} />
            <Diode x={122} y={TOP} {...ink} />
          </>
        )}
        {[NODE, OUT].map((x) => (
          <G key={x}>
            <Junction x={x} y={TOP} color={color} />
            <Junction x={x} y={BOTTOM} color={color} />
          </G>
        ))}
      </G>
    </Svg>
  )
}

const NODE = 84
const OUT = 162

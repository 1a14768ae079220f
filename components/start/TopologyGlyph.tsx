import Svg, { G } from 'react-native-svg'
import { LADDERS } from '@/components/schematic/ladders'
import { placeLadder, WINDING_GAP, type Rungs } from '@/components/schematic/stageLayout'
import { StationDrawing } from '@/components/schematic/StationDrawing'
import { Capacitor, Junction, Wire } from '@/components/schematic/symbols'
import type { Topology } from '@/converters/document'

const WIDTH = 200
const HEIGHT = 104
const TOP = 24
const BOTTOM = 98
const START = 10
const END = 190
const MIDDLE = (TOP + BOTTOM) / 2
const RUNGS: Rungs = { along: 46, narrow: 34, first: 46, across: 30, windings: 40 }
/** From the ladder's last node to the capacitor's, where nothing lies between, and to the edge. */
const TAIL = 28

/** The bare circuit, for a card. */
export function TopologyGlyph({
  topology,
  color,
  ground,
}: {
  readonly topology: Topology
  readonly color: string
  readonly ground: string
}) {
  const ink = { color, ground }
  const ladder = placeLadder(LADDERS[topology], RUNGS, 0)
  const stretch = (END - START - TAIL) / ladder.end
  const at = (x: number) => START + x * stretch
  const out = at(ladder.end)
  const parting = ladder.placed.find(({ station }) => station.stands === 'between')
  const rails = parting
    ? `M${START} ${TOP}H${at(parting.x) - WINDING_GAP}M${at(parting.x) + WINDING_GAP} ${TOP}H${END}M${START} ${BOTTOM}H${at(parting.x) - WINDING_GAP}M${at(parting.x) + WINDING_GAP} ${BOTTOM}H${END}`
    : `M${START} ${TOP}H${END}M${START} ${BOTTOM}H${END}`
  const nodes = [...ladder.placed.filter(({ station }) => station.stands === 'across').map(({ x }) => at(x)), out]
  return (
    <Svg width={WIDTH} height={HEIGHT} aria-hidden>
      <G>
        <Wire color={color} d={`${rails}M${out} ${TOP}V${BOTTOM}`} />
        {ladder.placed.map(({ station, x }) => (
          <StationDrawing
            key={station.name}
            station={station}
            x={at(x)}
            top={TOP}
            bottom={BOTTOM}
            gap={WINDING_GAP}
            isSynchronous={false}
            winding={{ upper: TOP + 22, below: BOTTOM - 15 }}
            {...ink}
          />
        ))}
        <Capacitor x={out} y={MIDDLE} isVertical {...ink} />
        {nodes.map((x) => (
          <G key={x}>
            <Junction x={x} y={TOP} color={color} />
            <Junction x={x} y={BOTTOM} color={color} />
          </G>
        ))}
      </G>
    </Svg>
  )
}

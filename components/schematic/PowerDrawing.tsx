import { G } from 'react-native-svg'
import { isInverting } from './ladders'
import { Lines } from './Lines'
import { BELOW_WINDING, UPPER_WINDING, WINDING_GAP, type Placed, type StageLayout } from './stageLayout'
import { partValues, stationPart } from './stageParts'
import { Branch, StationDrawing } from './StationDrawing'
import { Arrow, CurrentSource, Earth, HALF, Junction, Resistor, VoltageSource, Wire } from './symbols'
import { PlotText } from '@/components/plots/PlotText'
import type { DesignDocument } from '@/converters/document'

export interface DrawingProps {
  readonly design: DesignDocument
  readonly layout: StageLayout
  readonly color: string
  readonly ground: string
  readonly valueColor: string
}

/** Everything from the line to the load. */
export function PowerDrawing({ design, layout, color, ground, valueColor }: DrawingProps) {
  const { top, bottom, middle, source, rungs, banks, load } = layout
  const values = partValues(design)
  const ink = { color, ground }
  const beside = (x: number, lines: readonly string[], y = middle) => (
    <Lines x={x} y={y} lines={lines} color={valueColor} />
  )
  return (
    <G>
      <Rails layout={layout} color={color} />
      <Earth x={source} y={bottom} color={color} />
      <VoltageSource x={source} y={middle} isVertical {...ink} />
      <PlotText x={source + 6} y={middle - 18} color={color}>
        +
      </PlotText>
      {beside(source + 18, values.line)}
      {rungs.map((rung) => (
        <Rung key={rung.station.name} rung={rung} {...{ design, layout, color, ground, valueColor }} />
      ))}
      {banks.map((x, index) => (
        <G key={index}>
          <Wire color={color} d={`M${x} ${top}V${bottom}`} />
          <Branch
            at={{ x, y: middle, isVertical: true, ...ink }}
            hasResistor={(design.outputCapacitors[index]?.esr ?? 0) > 0}
          />
          {beside(x + 15, values.banks[index]?.pieces ?? [], middle - 22)}
          {beside(x + 12, [values.banks[index]?.esr ?? ''], middle + 24)}
        </G>
      ))}
      <Load kind={design.load} isInverting={isInverting(design.topology)} x={load} y={middle} {...ink} />
      {beside(load + (design.load === 'constant-current' ? 18 : 14), values.load)}
    </G>
  )
}

/** The rail and the return, parted where windings part them, with the nodes that stand on them. */
function Rails({ layout, color }: { readonly layout: StageLayout; readonly color: string }) {
  const { top, bottom, source, rungs, banks, load } = layout
  const parting = rungs.find(({ station }) => station.stands === 'between')
  const sides = parting
    ? [
        `M${parting.x - WINDING_GAP} ${top}H${source}V${bottom}H${parting.x - WINDING_GAP}`,
        `M${parting.x + WINDING_GAP} ${top}H${load}V${bottom}H${parting.x + WINDING_GAP}`,
      ]
    : [`M${source} ${top}H${load}V${bottom}H${source}V${top}`]
  const nodes = [...rungs.filter(({ station }) => station.stands === 'across').map(({ x }) => x), ...banks]
  return (
    <G>
      {sides.map((side) => (
        <Wire key={side} color={color} d={side} />
      ))}
      {nodes.map((x) => (
        <G key={x}>
          <Junction x={x} y={top} color={color} />
          <Junction x={x} y={bottom} color={color} />
        </G>
      ))}
    </G>
  )
}

/** How far lettering stands from the middle of an upright. */
const CLEAR = { transistor: 10, rectifier: 14, inductor: 12, capacitor: 15, branch: 15, windings: 0 } as const

/** One rung with its lettering. */
function Rung({ rung, design, layout, color, ground, valueColor }: DrawingProps & { readonly rung: Placed }) {
  const { station, x } = rung
  const { top, bottom, middle } = layout
  const { lines, lower = [] } = stationPart(design, station.name)
  const lettering = { color: valueColor }
  return (
    <G>
      <StationDrawing
        station={station}
        x={x}
        top={top}
        bottom={bottom}
        gap={WINDING_GAP}
        isSynchronous={design.rectifier.kind === 'synchronous'}
        hasResistor={lower.length > 0}
        winding={{ upper: UPPER_WINDING, below: BELOW_WINDING }}
        color={color}
        ground={ground}
      />
      {station.stands === 'across' ? (
        station.symbol === 'branch' && lower.length > 0 ? (
          <>
            <Lines {...lettering} x={x + 15} y={middle - 20} lines={lines} />
            <Lines {...lettering} x={x + 12} y={middle + 24} lines={lower} />
          </>
        ) : (
          <Lines {...lettering} x={x + CLEAR[station.symbol]} y={middle} lines={lines} />
        )
      ) : (
        <Lines {...lettering} x={x} y={station.stands === 'along' ? top - 26 : top - 16} lines={lines} isCentred />
      )}
      {station.storesEnergy ? (
        <>
          <Lines
            {...lettering}
            x={x - WINDING_GAP - 8}
            y={UPPER_WINDING}
            lines={stationPart(design, 'inductor').lines}
            endsHere
          />
          <Lines
            {...lettering}
            x={x - WINDING_GAP - 26}
            y={BELOW_WINDING + 4}
            lines={stationPart(design, 'switch').lines}
            endsHere
          />
        </>
      ) : null}
    </G>
  )
}

interface LoadProps {
  readonly kind: DesignDocument['load']
  readonly isInverting: boolean
  readonly x: number
  readonly y: number
  readonly color: string
  readonly ground: string
}

function Load({ kind, isInverting: goesUp, x, y, color, ground }: LoadProps) {
  if (kind === 'constant-current') {
    return (
      <G>
        <CurrentSource x={x} y={y} isVertical color={color} ground={ground} />
        <Arrow x={x} y={goesUp ? y - HALF.source - 9 : y + HALF.source + 9} to={goesUp ? 'up' : 'down'} color={color} />
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

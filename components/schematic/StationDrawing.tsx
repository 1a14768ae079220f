import { G } from 'react-native-svg'
import type { Station } from './ladders'
import { Capacitor, Diode, Inductor, Resistor, Transistor, Windings, Wire } from './symbols'

export interface StationDrawingProps {
  readonly station: Station
  readonly x: number
  readonly top: number
  readonly bottom: number
  /** Half the distance between windings. */
  readonly gap: number
  /** A transistor takes the diode's place. */
  readonly isSynchronous: boolean
  /** Of a branch: its capacitor has a resistor in series. */
  readonly hasResistor?: boolean
  /** Heights of a winding and of the switch below it. */
  readonly winding?: { readonly upper: number; readonly below: number }
  readonly color: string
  readonly ground: string
}

/** One rung of the ladder: the symbol with its upright. */
export function StationDrawing({ station, x, top, bottom, gap, winding, ...props }: StationDrawingProps) {
  const { color, ground } = props
  const ink = { color, ground }
  const middle = (top + bottom) / 2
  if (station.stands === 'between') {
    const upper = station.storesEnergy && winding ? winding.upper : middle
    return (
      <G>
        <Wire color={color} d={`M${x - gap} ${top}V${bottom}M${x + gap} ${top}V${bottom}`} />
        <Windings
          x={x}
          primary={upper}
          secondary={upper}
          gap={gap}
          storesEnergy={station.storesEnergy ?? false}
          {...ink}
        />
        {station.storesEnergy && winding ? <Transistor x={x - gap} y={winding.below} isVertical {...ink} /> : null}
      </G>
    )
  }
  const isVertical = station.stands === 'across'
  const at = { x, y: isVertical ? middle : top, isVertical, ...ink }
  return (
    <G>
      {isVertical ? <Wire color={color} d={`M${x} ${top}V${bottom}`} /> : null}
      <PartSymbol station={station} at={at} {...props} />
    </G>
  )
}

type At = Parameters<typeof Resistor>[0]

function PartSymbol({
  station,
  at,
  isSynchronous,
  hasResistor,
}: Pick<StationDrawingProps, 'station' | 'isSynchronous' | 'hasResistor'> & { readonly at: At }) {
  switch (station.symbol) {
    case 'transistor':
      return <Transistor {...at} />
    case 'rectifier':
      return isSynchronous ? (
        <Transistor {...at} />
      ) : (
        <G transform={`rotate(${station.isReversed ? 180 : 0} ${at.x} ${at.y})`}>
          <Diode {...at} />
        </G>
      )
    case 'inductor':
      return <Inductor {...at} />
    case 'capacitor':
      return <Capacitor {...at} />
    case 'branch':
      return <Branch at={at} hasResistor={hasResistor ?? false} />
    case 'windings':
      return null
  }
}

/** A capacitor, with its resistance below where it has one. */
export function Branch({ at, hasResistor }: { readonly at: At; readonly hasResistor: boolean }) {
  return (
    <G>
      <Capacitor {...at} y={hasResistor ? at.y - 20 : at.y} />
      {hasResistor ? <Resistor {...at} y={at.y + 22} /> : null}
    </G>
  )
}

/**
 * Every power stage as a ladder from the line to the output capacitors: what lies along the rail, what stands across from
 * the rail to the return, and where windings part the two sides. The drawing and the cards are laid out from it.
 */
import type { StagePart } from './stageParts'
import type { DesignDocument, Topology } from '@/converters/document'

export type StationName =
  | Exclude<StagePart['kind'], 'bank' | 'line' | 'load' | 'modulator' | 'amplifier' | 'inputFilter'>
  | 'forwardRectifier'
  | 'filterInductor'
  | 'filterCapacitor'
  | 'dampingBranch'

export type StationSymbol = 'transistor' | 'rectifier' | 'inductor' | 'capacitor' | 'branch' | 'windings'

export interface Station {
  readonly name: StationName
  readonly stands: 'along' | 'across' | 'between'
  readonly symbol: StationSymbol
  /** A rectifier that conducts to the left, or upwards. */
  readonly isReversed?: boolean
  /** Windings of opposite sense, the switch below the primary: stored energy, not passed on. */
  readonly storesEnergy?: boolean
  /** Takes no more room than its symbol, having no lettering of its own. */
  readonly isNarrow?: boolean
}

const along = (name: StationName, symbol: StationSymbol, more: Partial<Station> = {}): Station => ({
  name,
  stands: 'along',
  symbol,
  ...more,
})
const across = (name: StationName, symbol: StationSymbol, more: Partial<Station> = {}): Station => ({
  name,
  stands: 'across',
  symbol,
  ...more,
})

const INTO_COUPLING = [
  along('inductor', 'inductor'),
  across('switch', 'transistor'),
  along('couplingCapacitor', 'capacitor'),
]

export const LADDERS: Readonly<Record<Topology, readonly Station[]>> = {
  buck: [
    along('switch', 'transistor'),
    across('rectifier', 'rectifier', { isReversed: true }),
    along('inductor', 'inductor'),
  ],
  boost: [along('inductor', 'inductor'), across('switch', 'transistor'), along('rectifier', 'rectifier')],
  'buck-boost': [
    along('switch', 'transistor'),
    across('inductor', 'inductor'),
    along('rectifier', 'rectifier', { isReversed: true }),
  ],
  flyback: [
    { name: 'transformer', stands: 'between', symbol: 'windings', storesEnergy: true },
    along('rectifier', 'rectifier'),
  ],
  forward: [
    along('switch', 'transistor'),
    { name: 'transformer', stands: 'between', symbol: 'windings' },
    along('forwardRectifier', 'rectifier', { isNarrow: true }),
    across('rectifier', 'rectifier', { isReversed: true }),
    along('inductor', 'inductor'),
  ],
  sepic: [...INTO_COUPLING, across('secondInductor', 'inductor'), along('rectifier', 'rectifier')],
  cuk: [...INTO_COUPLING, across('rectifier', 'rectifier'), along('secondInductor', 'inductor')],
}

/** The filter's own rungs, ahead of the stage. */
export function filterLadder({ inputFilter }: Pick<DesignDocument, 'inputFilter'>): readonly Station[] {
  if (!inputFilter) return []
  const rungs = [along('filterInductor', 'inductor'), across('filterCapacitor', 'branch')]
  return inputFilter.dampingCapacitance ? [...rungs, across('dampingBranch', 'branch')] : rungs
}

/** Stages whose output is negative against the return. */
export const isInverting = (topology: Topology): boolean => topology === 'buck-boost' || topology === 'cuk'

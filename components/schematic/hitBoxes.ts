/** Where the parts of the schematic can be pressed, with the words that are read aloud for them. */
import { BELOW_WINDING, UPPER_WINDING, WINDING_GAP, type Placed, type StageLayout } from './stageLayout'
import { partValues, stationPart, type StagePart } from './stageParts'
import type { Box } from '@/components/plots/layout'
import type { DesignDocument } from '@/converters/document'

export interface HitBox extends Box {
  readonly key: string
  readonly part: StagePart
  readonly label: string
}

const say = (name: string, lines: readonly string[]) => [name, ...lines].join(', ')

export function hitBoxes(design: DesignDocument, layout: StageLayout): HitBox[] {
  const { top, bottom, source, rungs, banks, load, control, width } = layout
  const values = partValues(design)
  const uprights = [...rungs.filter((rung) => rung.station.stands !== 'along').map(leftOf), ...banks, load, width]
  const upright = (x: number) => {
    const next = uprights.find((other) => other > x + 1) ?? width
    return { x: x - 16, y: top + 26, width: next - x - 4, height: bottom - top - 44 }
  }
  const block = (left: number, right: number) => ({
    x: left,
    y: control.top,
    width: right - left,
    height: control.bottom - control.top,
  })
  return [
    { key: 'line', part: { kind: 'line' }, label: say('Line', values.line), ...upright(source) },
    ...rungs.flatMap((rung) => rungBoxes(design, layout, rung, upright)),
    ...banks.map((x, index) => ({
      key: `bank ${index}`,
      part: { kind: 'bank' as const, index },
      label: say(`Output capacitors${banks.length > 1 ? `, bank ${index + 1}` : ''}`, bankLines(values.banks[index])),
      ...upright(x),
    })),
    { key: 'load', part: { kind: 'load' }, label: say('Load', values.load), ...upright(load) },
    {
      key: 'modulator',
      part: { kind: 'modulator' },
      label: say('Modulator', values.modulator),
      ...block(control.left, control.middle - 14),
    },
    {
      key: 'amplifier',
      part: { kind: 'amplifier' },
      label: say('Error amplifier', values.amplifier),
      ...block(control.middle + 14, control.right),
    },
  ]
}

/** Lettering of windings that stand first reaches to their left. */
const leftOf = ({ station, x }: Placed) => (station.storesEnergy ? x - WINDING_GAP - 46 : x)

function rungBoxes(
  design: DesignDocument,
  { top, bottom }: StageLayout,
  { station, x }: Placed,
  upright: (x: number) => Box,
): HitBox[] {
  const { part, name, lines, lower = [] } = stationPart(design, station.name)
  const box = { key: station.name, part, label: say(name, [...lines, ...lower]) }
  if (station.stands === 'across') return [{ ...box, ...upright(x) }]
  if (station.stands === 'along') {
    const half = station.isNarrow ? 22 : 28
    return [{ ...box, x: x - half, y: 2, width: 2 * half, height: top + 10 }]
  }
  if (!station.storesEnergy) return [{ ...box, x: x - 24, y: 10, width: 48, height: bottom - 30 }]
  const primary = stationPart(design, 'inductor')
  const chopper = stationPart(design, 'switch')
  const left = x - WINDING_GAP - 56
  return [
    { ...box, x: x - 6, y: 10, width: 44, height: UPPER_WINDING + 18 },
    {
      key: 'inductor',
      part: primary.part,
      label: say('Magnetising inductance', primary.lines),
      ...{ x: left, y: UPPER_WINDING - 26, width: 50 + WINDING_GAP, height: 52 },
    },
    {
      key: 'switch',
      part: chopper.part,
      label: say(chopper.name, chopper.lines),
      ...{ x: left, y: BELOW_WINDING - 26, width: 56 + WINDING_GAP, height: 52 },
    },
  ]
}

function bankLines(bank: { readonly pieces: readonly string[]; readonly esr: string } | undefined): readonly string[] {
  return bank ? [bank.pieces.join(' '), `ESR ${bank.esr}`] : []
}

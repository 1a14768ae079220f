/** Where the crossover may sit, and what bounds it on each side. */
import { formatQuantity } from '../quantities'
import { rightHalfPlaneZero } from '../plant'
import { modulus } from '../numeric/complex'
import type { Bound, CrossoverWindow, RootRole } from '../results'
import type { CornerPlant, CornerPlants } from './cornerPlants'

const COMMON_PRACTICE = 'common practice, no source'
/** Shares of the switching frequency and of the right-half-plane zero that the crossover stays below. */
const SWITCHING_SHARE = 1 / 5
const RIGHT_HALF_PLANE_SHARE = 1 / 3
/** Open-loop gain that an op-amp keeps in hand over the gain that its network needs: 20 dB. */
const GAIN_IN_HAND = 10

const hertz = (frequency: number) => formatQuantity(frequency, 'Hz')
const where = ({ lineVoltage, outputCurrent }: CornerPlant) =>
  `${formatQuantity(lineVoltage, 'V')} and ${formatQuantity(outputCurrent, 'A')}`

export function crossoverWindow(plants: CornerPlants): CrossoverWindow {
  const bounds = [switchingBound(plants), zeroBound(plants), amplifierBound(plants), lowerBound(plants)].filter(
    (bound) => bound !== null,
  )
  const frequencies = (side: Bound['side']) => bounds.filter((bound) => bound.side === side).map((b) => b.frequency)
  return { lower: Math.max(0, ...frequencies('lower')), upper: Math.min(...frequencies('upper')), bounds }
}

function switchingBound({ design: { switchingFrequency } }: CornerPlants): Bound {
  const frequency = SWITCHING_SHARE * switchingFrequency
  const text = `A fifth of the switching frequency, ${hertz(frequency)}: above it the sampling by the switch takes too much phase. A tenth to a fifth is usual.`
  return { side: 'upper', kind: 'switching-frequency', frequency, text, source: COMMON_PRACTICE }
}

function zeroBound({ corners }: CornerPlants): Bound | null {
  const found = extreme(corners, ({ plant }) => rightHalfPlaneZero(plant.zeros), Math.min)
  if (!found) return null
  const frequency = RIGHT_HALF_PLANE_SHARE * found.frequency
  const text = `A third of the lowest right-half-plane zero, which is at ${hertz(found.frequency)} at ${where(found.corner)}: it takes phase while it adds gain, and no network can undo that.`
  return { side: 'upper', kind: 'right-half-plane-zero', frequency, text, source: COMMON_PRACTICE }
}

/** Up to where an op-amp has gain in hand; a transconductance amplifier is modelled without a bandwidth limit. */
function amplifierBound({ design: { amplifier, switchingFrequency }, omegas, corners }: CornerPlants): Bound | null {
  if (amplifier.kind !== 'op-amp') return null
  const hasGain = (i: number) => {
    const least = Math.min(...corners.map(({ samples }) => modulus(samples[i]!)))
    return (2 * Math.PI * amplifier.gainBandwidth) / omegas[i]! >= GAIN_IN_HAND / least
  }
  let last = omegas.length - 1
  while (last > 0 && !hasGain(last)) last--
  const frequency = omegas[last]! / (2 * Math.PI)
  if (frequency >= switchingFrequency / 2) return null
  const text = `The amplifier's gain-bandwidth product of ${hertz(amplifier.gainBandwidth)} leaves 20 dB over the gain that the network needs up to ${hertz(frequency)}.`
  return { side: 'upper', kind: 'amplifier', frequency, text, source: COMMON_PRACTICE }
}

function lowerBound({ design: { modulator }, corners }: CornerPlants): Bound | null {
  if (modulator.kind === 'voltage-mode' && corners[0].plant.orbit.conduction === 'continuous') {
    const { frequency, corner } = extreme(corners, resonanceOf, Math.max)!
    const text = `The output filter's resonance, ${hertz(frequency)} at ${where(corner)}: below it the loop would cross where the phase falls through 180°.`
    return { side: 'lower', kind: 'resonance', frequency, text, source: COMMON_PRACTICE }
  }
  const found = extreme(corners, (one) => lowestOf(one, 'load-capacitor'), Math.max)
  if (!found) return null
  const { frequency, corner } = found
  const text = `The pole of load and output capacitors, ${hertz(frequency)} at ${where(corner)}: below it the loop only gets slower.`
  return { side: 'lower', kind: 'load-pole', frequency, text, source: COMMON_PRACTICE }
}

/** Natural frequency of the output filter, Hz; of two real poles their geometric mean. Null in discontinuous conduction. */
export function resonanceOf({ plant }: CornerPlant): number | null {
  const pair = plant.poles.filter((pole) => pole.role === 'output-filter')
  return pair.length === 2 ? Math.sqrt(pair[0]!.frequency * pair[1]!.frequency) : null
}

/** Lowest pole or zero of a role, Hz. */
export function lowestOf({ plant }: CornerPlant, role: RootRole): number | null {
  const found = [...plant.poles, ...plant.zeros].filter((root) => root.role === role).map((root) => root.frequency)
  return found.length > 0 ? Math.min(...found) : null
}

function extreme(
  corners: readonly CornerPlant[],
  read: (corner: CornerPlant) => number | null,
  pick: (...values: number[]) => number,
): { readonly frequency: number; readonly corner: CornerPlant } | null {
  const found = corners.flatMap((corner) => {
    const frequency = read(corner)
    return frequency === null ? [] : [{ frequency, corner }]
  })
  if (found.length === 0) return null
  const frequency = pick(...found.map((one) => one.frequency))
  return found.find((one) => one.frequency === frequency)!
}

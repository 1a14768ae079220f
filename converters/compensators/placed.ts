/**
 * Zeros and poles placed against the plant's own: zeros at the output filter's resonance (in current mode and discontinuous
 * conduction at the load pole), poles at the ESR zero, the right-half-plane zero and half the switching frequency,
 * as far as they lie below it. Common practice; the zeros move down together until every corner has phase enough.
 */
import type { CompensatorType } from '../document'
import { bestAttempt, tried, type Attempt, type AttemptRequest } from './attempts'
import type { CornerPlants } from './cornerPlants'
import { pairRoots, placeNetwork } from './placement'
import { lowestOf, resonanceOf } from './window'

/** How far the zeros are moved down, step by step, until every corner holds. */
const SHARES = Array.from({ length: 13 }, (_, i) => 10 ** (-i / 8))

/** The best placed network at one crossover, or null where the plant offers no place or not enough phase. */
export function attemptPlaced(request: AttemptRequest & { readonly type: CompensatorType }): Attempt | null {
  const { plants, upperResistance, goal, type } = request
  const zeros = zerosFor(plants, type)
  if (zeros.length === 0) return null
  const poles = polesFor(plants, zeros)
  return bestAttempt(
    SHARES.map((share) => () => {
      const placement = pairRoots(
        zeros.map((zero) => share * zero),
        poles,
      )
      const ideal = 'kind' in placement ? placement : placeNetwork(plants.design, upperResistance, placement, goal)
      return tried(plants, goal, 'placed', ideal)
    }),
  )
}

/** Hz at nominal line and full load; none where the plant has no poles to meet. */
function zerosFor({ corners: [nominal], design }: CornerPlants, type: CompensatorType): number[] {
  const resonance = resonanceOf(nominal)
  if (resonance !== null) return type === 'I' ? [] : type === 'II' ? [resonance] : [resonance, resonance]
  const loadPole = lowestOf(nominal, 'load-capacitor')
  if (loadPole === null || type === 'I') return []
  if (type === 'II') return [loadPole]
  const fastPole = lowestOf(nominal, 'inductor')
  return fastPole !== null && fastPole < design.switchingFrequency / 2 ? [loadPole, fastPole] : []
}

/** As many as there are zeros, lowest first, each above every zero. */
function polesFor({ corners, design }: CornerPlants, zeros: readonly number[]): number[] {
  const half = design.switchingFrequency / 2
  const rightHalfPlane = corners.flatMap((corner) => lowestOf(corner, 'right-half-plane-zero') ?? [])
  const esr = lowestOf(corners[0], 'capacitor-esr')
  const places = [...(esr === null ? [] : [esr]), ...(rightHalfPlane.length > 0 ? [Math.min(...rightHalfPlane)] : [])]
  return [...places.filter((place) => place < half && place > Math.max(...zeros)), half, half]
    .sort((a, b) => a - b)
    .slice(0, zeros.length)
}

/**
 * Zeros and poles placed against the plant's own: zeros at the output filter's resonance (in current mode and discontinuous
 * conduction at the load pole), poles at the ESR zero, the right-half-plane zero and half the switching frequency,
 * as far as they lie below it. Common practice; the zeros move down together where the phase is not yet enough.
 */
import type { CompensatorType } from '../document'
import { withReserve, type Attempt, type AttemptRequest, type Goal } from './attempts'
import type { CornerPlants } from './cornerPlants'
import { boostOf } from './kFactor'
import { pairRoots, placeNetwork, synthesisProblem, type Synthesis } from './placement'
import { lowestOf, resonanceOf } from './window'

const LOWEST_SHARE = 0.1
const BISECTIONS = 24

/** The best placed network at one crossover, or null where the plant offers no place or not enough phase. */
export function attemptPlaced(request: AttemptRequest & { readonly type: CompensatorType }): Attempt | null {
  const { plants, upperResistance, goal, type } = request
  const zeros = zerosFor(plants, type)
  if (zeros.length === 0) return null
  const poles = polesFor(plants, zeros)
  return withReserve(plants, goal, 'placed', (boostDeg) => {
    const place = (share: number) =>
      placeAt(
        plants,
        upperResistance,
        zeros.map((zero) => share * zero),
        poles,
        goal,
      )
    return lowerUntilEnough(place, goal, boostDeg)
  })
}

function placeAt(
  { design }: CornerPlants,
  upperResistance: number,
  zeros: readonly number[],
  poles: readonly number[],
  { omega, gain }: Goal,
): Synthesis {
  const placement = pairRoots(zeros, poles)
  return 'kind' in placement ? placement : placeNetwork(design, upperResistance, placement, { omega, gain })
}

/** The zeros as high as the boost allows: what they give away in low-frequency gain is kept small. */
function lowerUntilEnough(place: (share: number) => Synthesis, goal: Goal, boostDeg: number): Synthesis {
  const enough = (synthesis: Synthesis) =>
    synthesis.kind === 'network' && boostOf(synthesis.network, goal.omega) >= boostDeg
  const unmoved = place(1)
  if (enough(unmoved)) return unmoved
  let low = LOWEST_SHARE
  let best = place(low)
  if (!enough(best)) return synthesisProblem('Zeros and poles of the plant leave no place for enough phase.')
  let high = 1
  for (let i = 0; i < BISECTIONS; i++) {
    const middle = Math.sqrt(low * high)
    const candidate = place(middle)
    if (enough(candidate)) {
      best = candidate
      low = middle
    } else {
      high = middle
    }
  }
  return best
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

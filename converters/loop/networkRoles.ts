/** Which of a network's roots the designer chose, which one integrates, and which belong to the amplifier. */
import type { Network } from '../compensators/networks'
import type { Complex } from '../numeric/complex'
import type { Root } from '../results'
import { describeRoots } from '../roots'

/** Poles with their zeros; the lowest pole is the integrator's, however large the amplifier's gain is. */
export function describeNetworkRoots(
  network: Network,
  poles: readonly Complex[],
  zeros: readonly Complex[],
): { compensatorPoles: Root[]; compensatorZeros: Root[] } {
  const size = ({ re, im }: Complex) => Math.hypot(re, im)
  const sorted = [...poles].sort((a, b) => size(a) - size(b))
  // An op-amp's finite bandwidth adds one pole beyond those of the parts: the fastest.
  const amplifierPole = network.kind === 'op-amp' ? sorted.at(-1) : undefined
  return {
    compensatorPoles: describeRoots(poles, (pole) =>
      pole === sorted[0] ? 'integrator' : pole === amplifierPole ? 'amplifier' : 'compensator',
    ),
    compensatorZeros: describeRoots(zeros, () => 'compensator'),
  }
}

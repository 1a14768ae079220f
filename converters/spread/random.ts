/** Seeded random numbers, and a Latin hypercube made of them whose points can be asked for in any order. */

/**
 * xoshiro128**, seeded through a mixed counter so that neighbouring seeds give unrelated streams.
 * Sources: Blackman and Vigna, "Scrambled linear pseudorandom number generators", ACM Trans. Mathematical Software 2021;
 * Steele, Lea and Flood, "Fast splittable pseudorandom number generators", OOPSLA 2014 (the mixed counter).
 * @param seed - any integers; the same ones give the same stream.
 * @returns a function that draws 32 bits, as an integer from 0 to 2³² − 1.
 */
export function randomBits(...seed: readonly number[]): () => number {
  let mixed = 0
  for (const part of seed) mixed = avalanche(mixed + GOLDEN_RATIO) ^ part
  let a = avalanche(mixed + GOLDEN_RATIO)
  let b = avalanche(mixed + 2 * GOLDEN_RATIO)
  let c = avalanche(mixed + 3 * GOLDEN_RATIO)
  let d = avalanche(mixed + 4 * GOLDEN_RATIO)
  return () => {
    const product = Math.imul(b, 5)
    const answer = Math.imul((product << 7) | (product >>> 25), 9)
    const shifted = b << 9
    c ^= a
    d ^= b
    b ^= c
    a ^= d
    c ^= shifted
    d = (d << 11) | (d >>> 21)
    return answer >>> 0
  }
}

/** 2³² over the golden ratio, the step of the counter. */
const GOLDEN_RATIO = 0x9e3779b9

/** Every bit of the input moves about half of the bits of the output. */
function avalanche(bits: number): number {
  let z = bits | 0
  z = Math.imul(z ^ (z >>> 16), 0x85ebca6b)
  z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35)
  return z ^ (z >>> 16)
}

/** From 32 bits to the middle of one of 2³² cells of (0, 1): never an end, so that every quantile of it is finite. */
export const unitInterval = (bits: number): number => (bits + 0.5) / 2 ** 32

export interface LatinHypercube {
  /** Fills `point` with the coordinates, each in (0, 1), of point `index`. */
  readonly point: (index: number, point: Float64Array) => void
}

/**
 * Each axis is cut into `count` strata of equal probability, and every stratum holds exactly one point.
 * Source: McKay, Beckman and Conover, "A comparison of three methods for selecting values of input variables in the
 * analysis of output from a computer code", Technometrics 1979.
 */
export function latinHypercube(count: number, dimensions: number, seed: number): LatinHypercube {
  const strata = Array.from({ length: dimensions }, (_, axis) => permutation(count, randomBits(seed, 1, axis)))
  return {
    point(index, point) {
      // The place inside the stratum hangs on the point alone, so that workers may share the points among them.
      const draw = randomBits(seed, 2, index)
      for (let axis = 0; axis < dimensions; axis++) {
        point[axis] = (strata[axis]![index]! + unitInterval(draw())) / count
      }
    },
  }
}

/** 0 … count − 1 in random order (Fisher and Yates 1938, as an exchange in place: Durstenfeld 1964). */
function permutation(count: number, draw: () => number): Uint32Array {
  const order = Uint32Array.from({ length: count }, (_, i) => i)
  for (let i = count - 1; i > 0; i--) {
    const j = Math.floor(unitInterval(draw()) * (i + 1))
    const kept = order[i]!
    order[i] = order[j]!
    order[j] = kept
  }
  return order
}

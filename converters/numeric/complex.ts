/** Complex numbers as plain pairs. Results cross worker boundaries, so there is no class. */
export interface Complex {
  readonly re: number
  readonly im: number
}

export const complex = (re: number, im = 0): Complex => ({ re, im })

export const add = (a: Complex, b: Complex): Complex => ({ re: a.re + b.re, im: a.im + b.im })
export const subtract = (a: Complex, b: Complex): Complex => ({ re: a.re - b.re, im: a.im - b.im })
export const scale = (a: Complex, k: number): Complex => ({ re: a.re * k, im: a.im * k })
export const multiply = (a: Complex, b: Complex): Complex => ({
  re: a.re * b.re - a.im * b.im,
  im: a.re * b.im + a.im * b.re,
})

/** a/b, scaled so that the square of a large or small b does not overflow (Smith 1962). */
export function divide(a: Complex, b: Complex): Complex {
  if (Math.abs(b.re) >= Math.abs(b.im)) {
    const ratio = b.im / b.re
    const denominator = b.re + b.im * ratio
    return { re: (a.re + a.im * ratio) / denominator, im: (a.im - a.re * ratio) / denominator }
  }
  const ratio = b.re / b.im
  const denominator = b.re * ratio + b.im
  return { re: (a.re * ratio + a.im) / denominator, im: (a.im * ratio - a.re) / denominator }
}

export const modulus = (a: Complex): number => Math.hypot(a.re, a.im)

/** Argument in degrees, in (−180, 180]. */
export const argumentDeg = (a: Complex): number => (Math.atan2(a.im, a.re) * 180) / Math.PI

/** 20·log₁₀|a|, floored at −400 dB so that an exact zero stays a number. */
export const decibels = (a: Complex): number => Math.max(-400, 20 * Math.log10(modulus(a)))

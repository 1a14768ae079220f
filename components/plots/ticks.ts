/** Ticks and ranges of the plots' axes. */
export interface Tick {
  readonly value: number
  readonly label: string
}

const PREFIXES = ['m', '', 'k', 'M', 'G'] as const

/** 0.001 to 10⁹ as it is written along a frequency axis: 10, 100, 1 k, 10 k. */
export function decadeLabel(decade: number): string {
  const thousands = Math.floor(decade / 3)
  const prefix = PREFIXES[thousands + 1]
  if (prefix === undefined) return `1e${decade}`
  return `${10 ** (decade - 3 * thousands)}${prefix === '' ? '' : ` ${prefix}`}`
}

/** Powers of ten from `low` to `high`, both included where they are powers of ten. */
export function decadeTicks(low: number, high: number): Tick[] {
  const first = Math.ceil(Math.log10(low) - 1e-9)
  const last = Math.floor(Math.log10(high) + 1e-9)
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, index) => ({
    value: 10 ** (first + index),
    label: decadeLabel(first + index),
  }))
}

/** 2 to 9 times each power of ten between `low` and `high`: the thin lines of a decade grid. */
export function decadeSubdivisions(low: number, high: number): number[] {
  const lines: number[] = []
  for (let decade = Math.floor(Math.log10(low)); decade <= Math.log10(high); decade += 1) {
    for (let digit = 2; digit <= 9; digit += 1) {
      const value = digit * 10 ** decade
      if (value > low && value < high) lines.push(value)
    }
  }
  return lines
}

export interface LinearAxis {
  readonly low: number
  readonly high: number
  readonly ticks: readonly number[]
}

/**
 * An axis that holds every value, ends on whole steps, and has at most `most` ticks.
 * @param steps - Steps that read well, smallest first: 10, 20, 40 for decibels, 45, 90 for degrees.
 */
export function wholeAxis(values: readonly number[], steps: readonly number[], most: number): LinearAxis {
  const finite = values.filter(Number.isFinite)
  const least = finite.length === 0 ? 0 : Math.min(...finite)
  const greatest = finite.length === 0 ? 0 : Math.max(...finite)
  for (const step of steps) {
    const axis = axisWithStep(least, greatest, step)
    if (axis.ticks.length <= most) return axis
  }
  const widest = steps.at(-1) ?? 1
  return axisWithStep(least, greatest, widest * Math.ceil((greatest - least) / (widest * Math.max(1, most - 2))))
}

function axisWithStep(least: number, greatest: number, step: number): LinearAxis {
  const low = Math.floor(least / step + 1e-9) * step
  const high = Math.max(low + step, Math.ceil(greatest / step - 1e-9) * step)
  const ticks = Array.from({ length: Math.round((high - low) / step) + 1 }, (_, index) => low + index * step)
  return { low, high, ticks }
}

/** Decibels relative to one ohm as the ohms that they are: −40 is 10 mΩ. */
export function ohmLabel(decibels: number): string {
  const decade = Math.round(decibels / 20)
  if (Math.abs(decibels - 20 * decade) > 1e-6) return ''
  const thousands = Math.floor(decade / 3)
  const prefix = ({ '-3': 'n', '-2': 'µ', '-1': 'm', '0': '', '1': 'k', '2': 'M' } as Record<string, string>)[thousands]
  return prefix === undefined ? `1e${decade} Ω` : `${10 ** (decade - 3 * thousands)} ${prefix}Ω`
}

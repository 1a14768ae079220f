/**
 * Quantities as engineers type and read them: `4.7u`, `4u7`, `22 µF`, `2k2`, `0R01`, `3V3`, `1,5 m`, `1e-6`. Both
 * directions keep the decimal digits as text until the last step, so that `4.7 µ` becomes exactly the number 4.7e-6.
 * Prefixes: IEC 80000-1 (femto to tera). A letter in place of the decimal mark: IEC 60062, clause 4.
 */

/** A percentage is a fraction inside (12 % is 0.12). The empty unit is a plain number. */
export const UNITS = ['H', 'F', 'Ω', 'V', 'A', 'Hz', 's', 'V/s', 'S', 'W', '%', '°', 'dB', ''] as const
export type Unit = (typeof UNITS)[number]

export type ParsedQuantity =
  { readonly kind: 'value'; readonly value: number } | { readonly kind: 'problem'; readonly message: string }

interface UnitForm {
  readonly name: string // with its article, for sentences
  readonly example: string
  /** Spellings in lower case, as far as case does not tell two units apart, each with its power of ten. */
  readonly spellings: Readonly<Record<string, number>>
  readonly prefixes: boolean
  /** m and M are both metric; where one of them cannot be meant, the other probably is. */
  readonly implausible?: 'm' | 'M'
}

const FORMS: Readonly<Record<Unit, UnitForm>> = {
  H: form('an inductance', '4.7 µH', { h: 0, henry: 0 }, 'M'),
  F: form('a capacitance', '22 µF', { f: 0, farad: 0 }, 'M'),
  Ω: form('a resistance', '10 kΩ', { ω: 0, ohm: 0, ohms: 0, r: 0 }),
  V: form('a voltage', '3.3 V', { v: 0, volt: 0, volts: 0 }, 'M'),
  A: form('a current', '1.5 A', { a: 0, amp: 0, amps: 0, ampere: 0 }, 'M'),
  Hz: form('a frequency', '500 kHz', { hz: 0, hertz: 0 }, 'm'),
  s: form('a time', '20 µs', { s: 0, sec: 0 }, 'M'),
  'V/s': form('a slope', '60 kV/s', { 'v/s': 0, 'v/ms': 3, 'v/us': 6, 'v/ns': 9 }, 'm'),
  S: form('a transconductance', '1 mS', { S: 0, siemens: 0, 'a/v': 0 }, 'M'),
  W: form('a power', '5 W', { w: 0, watt: 0, watts: 0 }, 'M'),
  '%': { ...form('a percentage', '20 %', { '%': -2, '': -2 }), prefixes: false },
  '°': { ...form('an angle in degrees', '55°', { '°': 0, deg: 0 }), prefixes: false },
  dB: { ...form('a ratio in decibels', '10 dB', { db: 0 }), prefixes: false },
  '': form('a number', '1.5', {}),
}

function form(
  name: string,
  example: string,
  spellings: Readonly<Record<string, number>>,
  implausible?: 'm' | 'M',
): UnitForm {
  return { name, example, spellings, prefixes: true, ...(implausible && { implausible }) }
}

const PREFIXES: ReadonlyMap<string, number> = new Map([
  ['f', -15],
  ['p', -12],
  ['n', -9],
  ['u', -6],
  ['m', -3],
  ['', 0],
  ['k', 3],
  ['M', 6],
  ['G', 9],
  ['T', 12],
])
const PREFIX_BY_EXPONENT = new Map([...PREFIXES].map(([letter, exponent]) => [exponent, letter === 'u' ? 'µ' : letter]))

const LONGEST_TEXT = 60

/**
 * Reads what was typed into a field that holds `unit`. The unit and its prefix may be left out; a decimal comma, thin
 * spaces, µ from any keyboard and a letter in place of the decimal mark are understood. Upper and lower case
 * matter for m (milli) and M (mega) and for s (second) and S (siemens), elsewhere they do not.
 * @returns the value in SI units, or a sentence that says what is wrong and what would be right.
 */
export function parseQuantity(text: string, unit: Unit): ParsedQuantity {
  const typed = normalise(text)
  const { name, example } = FORMS[unit]
  if (typed === '') return problem(`Enter ${name}, for example ${example}.`)
  if (typed.length > LONGEST_TEXT) return problem(`That is too long to be ${name}, for example ${example}.`)
  const parts = split(typed)
  if (parts === null) return problem(`That is not a number. This field needs ${name}, for example ${example}.`)
  const decimal = readDecimal(parts.digits)
  if (decimal.kind === 'problem') return decimal
  const scale = readSuffix(parts.infix, parts.suffix, unit)
  if (scale === null) return problem(explainSuffix(parts, unit))
  // The prefix alone counts: mV/µs is a usual slope, mV/s is not.
  const { implausible } = FORMS[unit]
  if (implausible !== undefined && scale.prefix === implausible && scale.exponent === PREFIXES.get(implausible)) {
    const meant = implausible === 'm' ? 'M' : 'm'
    const number = parts.exponent === 0 ? decimal.text : `${decimal.text}e${parts.exponent}`
    return problem(`m is milli, a thousandth; M is mega, a million. Write ${number} ${meant}${unit} if that is meant.`)
  }
  return toValue(`${parts.sign}${decimal.text}`, parts.exponent + scale.exponent)
}

/** One spelling for each character that keyboards and documents write in several ways; outer spaces gone. */
function normalise(text: string): string {
  return text
    .slice(0, 4 * LONGEST_TEXT)
    .replace(/[µμ]/g, 'u')
    .replace(/\u2126/g, 'Ω')
    .replace(/[−–]/g, '-')
    .replace(/\s+/g, ' ')
    .trim()
}

interface TypedParts {
  readonly sign: '' | '-'
  readonly digits: string
  readonly exponent: number
  readonly infix: string
  readonly suffix: string
}

/** Sign, digits with their marks, power of ten, the letter in place of the mark, and what follows. */
function split(typed: string): TypedParts | null {
  const coded = /^([+-]?) ?(\d*)([a-zA-ZΩ])(\d+) ?(\D*)$/.exec(typed)
  if (coded && !/^e$/i.test(coded[3]!)) {
    const [, sign, whole, infix, fraction, suffix] = coded
    const digits = `${whole || '0'}.${fraction}`
    return { sign: sign === '-' ? '-' : '', digits, exponent: 0, infix: infix!, suffix: suffix!.trim() }
  }
  const plain = /^([+-]?) ?(\d[\d., ]*|[.,]\d+)(?:e([+-]?\d{1,6}))?(?!\d) ?([^\d.,].*)?$/i.exec(typed)
  if (!plain) return null
  const [, sign, digits, exponent, suffix] = plain
  return {
    sign: sign === '-' ? '-' : '',
    digits: digits!.trim(),
    exponent: Number(exponent ?? 0),
    infix: '',
    suffix: (suffix ?? '').trim(),
  }
}

type Decimal =
  { readonly kind: 'decimal'; readonly text: string } | { readonly kind: 'problem'; readonly message: string }

/** Tells decimal marks from marks between thousands. One comma before exactly three digits can be either: ask. */
function readDecimal(digits: string): Decimal {
  const decimal = (text: string): Decimal => ({ kind: 'decimal', text })
  if (/^\d+$/.test(digits)) return decimal(digits)
  if (/^[1-9]\d{0,2},\d{3}$/.test(digits)) {
    const whole = digits.replace(',', '')
    return problem(
      `${digits} can mean ${digits.replace(',', '.')} or ${whole}. Write a decimal point, or no mark at all.`,
    )
  }
  if (/^\d*[.,]\d*$/.test(digits)) return decimal(digits.replace(',', '.'))
  for (const [group, mark] of [
    [' ', '[.,]'],
    [',', '\\.'],
    ['\\.', ','],
  ] as const) {
    if (new RegExp(`^\\d{1,3}(${group}\\d{3})+(${mark}\\d*)?$`).test(digits)) {
      return decimal(digits.replace(new RegExp(group, 'g'), '').replace(',', '.'))
    }
  }
  return problem(`${digits} has marks that do not make one number. Write it with a single decimal point.`)
}

interface Scale {
  readonly prefix: string
  readonly exponent: number
}

/** The prefix and power of ten that a suffix stands for in `unit`, or null if it is not one of that unit's. */
function readSuffix(infix: string, suffix: string, unit: Unit): Scale | null {
  if (infix !== '') {
    // Either the unit itself stands at the mark (3V3, 0R01), or a prefix does and the unit may follow (4u7, 2k2 Ω).
    const asUnit = spelled(infix, unit)
    if (asUnit !== null && suffix === '') return { prefix: '', exponent: asUnit }
    return suffix === '' || spelled(suffix, unit) !== null ? readSuffix('', infix + suffix, unit) : null
  }
  if (suffix === '') return { prefix: '', exponent: spelled('', unit) ?? 0 }
  const whole = spelled(suffix, unit)
  if (whole !== null && !(suffix === 'f' && unit === 'F')) return { prefix: '', exponent: whole }
  const prefix = prefixLetter(suffix[0]!)
  if (prefix === null || !FORMS[unit].prefixes) return null
  const rest = suffix.slice(1).trim()
  const exponent = rest === '' ? 0 : spelled(rest, unit)
  return exponent === null ? null : { prefix, exponent: exponent + PREFIXES.get(prefix)! }
}

/** The power of ten of a unit's spelling, or null. Case is kept for seconds and siemens alone. */
function spelled(text: string, unit: Unit): number | null {
  const key =
    text === 'S' || (unit === 's' && text !== text.toLowerCase()) ? text : text.replace(/ /g, '').toLowerCase()
  const { spellings } = FORMS[unit]
  return Object.hasOwn(spellings, key) ? spellings[key]! : null
}

/** Upper and lower case are told apart for m and M alone. */
function prefixLetter(letter: string): string | null {
  if (letter === 'm' || letter === 'M') return letter
  for (const known of [letter.toLowerCase(), letter.toUpperCase()]) if (PREFIXES.has(known)) return known
  return null
}

/** Why a suffix does not fit: another quantity's unit, or none at all. */
function explainSuffix({ infix, suffix }: TypedParts, unit: Unit): string {
  const { name, example } = FORMS[unit]
  const needed = `this field needs ${name}, for example ${example}.`
  if (readSuffix(infix, suffix, '') !== null) return `A prefix does not go with ${name}; ${needed}`
  const other = UNITS.find((candidate) => readSuffix(infix, suffix, candidate) !== null)
  if (other !== undefined) return `That is ${FORMS[other].name}; ${needed}`
  return `${suffix || infix} is not a unit known here; ${needed}`
}

function toValue(decimal: string, exponent: number): ParsedQuantity {
  const value = Number(`${decimal}e${exponent}`)
  if (!Number.isFinite(value)) return problem('That number is too large.')
  if (value === 0 && /[1-9]/.test(decimal)) return problem('That number is too small to tell from zero.')
  return { kind: 'value', value: value === 0 ? 0 : value }
}

function problem(message: string): { readonly kind: 'problem'; readonly message: string } {
  return { kind: 'problem', message }
}

/**
 * Writes a value in SI units for people: engineering prefixes, `digits` significant figures, "4.70 µH". A percentage, an
 * angle, decibels and a plain number take no prefix. A value that is not finite is shown as "–".
 */
export function formatQuantity(value: number, unit: Unit, digits = 3): string {
  if (!Number.isFinite(value)) return '–'
  const join = unit === '' || unit === '°' ? '' : ' '
  if (value === 0) return `0${join}${unit}`
  if (!FORMS[unit].prefixes || unit === '') {
    return withMinus(`${plainNumber(unit === '%' ? value * 100 : value, digits)}${join}${unit}`)
  }
  // Rounding comes first: 999.96 µ rounds to 1.00 m, not to 1000 µ.
  const [mantissa, exponentText] = value.toExponential(digits - 1).split('e') as [string, string]
  const exponent = Number(exponentText)
  const thousands = 3 * Math.floor(exponent / 3)
  const prefix = PREFIX_BY_EXPONENT.get(thousands)
  // A prefix that nobody means for this unit would be asked about when typed back.
  if (prefix === undefined || prefix === FORMS[unit].implausible) return withMinus(`${mantissa}e${exponent} ${unit}`)
  const shift = exponent - thousands
  return withMinus(`${Number(`${mantissa}e${shift}`).toFixed(Math.max(0, digits - 1 - shift))} ${prefix}${unit}`)
}

/** Significant figures without a power of ten, as far as that stays readable. */
function plainNumber(value: number, digits: number): string {
  const [mantissa, exponentText] = value.toExponential(digits - 1).split('e') as [string, string]
  const exponent = Number(exponentText)
  if (exponent < -4 || exponent > 8) return `${mantissa}e${exponent}`
  return Number(`${mantissa}e${exponent}`).toFixed(Math.max(0, digits - 1 - exponent))
}

const withMinus = (text: string): string => text.replace(/^-/, '−')

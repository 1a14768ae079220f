import * as fc from 'fast-check'
import { expect, it } from 'vitest'
import { eigenvalues, invariantZeros } from '@/converters/numeric/eigen'
import { exponential } from '@/converters/numeric/exponential'
import { flatten } from '@/converters/numeric/linearSystem'
import { findRoot } from '@/converters/numeric/rootFinding'
import { expectRelative } from '@/tests/support/expectRelative'
import { scipy } from '@/tests/support/scipy'

/** Circuit-like systems: entries over nine decades, as microhenries beside millifarads give. */
const badlyScaled = {
  A: [
    [-3.6e3, -4.5e5, 0, 2.1e6],
    [5.3e3, -1.3e4, 8.8e2, 0],
    [1.1e2, 0, -2.5e7, 3.1e1],
    [0, 7.7e-3, 4.2e-2, -6.1e1],
  ],
  b: [5.4e6, 0, 3.3, 1.2],
  c: [0, 1, 3e-3, 0],
}

it('finds the eigenvalues and the matrix exponential that SciPy finds', () => {
  const answer = scipy<{ re: number[]; im: number[]; exp: number[][] }>(
    `
A = np.array(data['A'])
values = sorted(scipy.linalg.eigvals(A), key=lambda v: (abs(v), -v.imag))
answer = {'re': [v.real for v in values], 'im': [v.imag for v in values], 'exp': scipy.linalg.expm(A * 1e-6).tolist()}`,
    badlyScaled,
  )
  const ours = eigenvalues(badlyScaled.A).sort((a, b) => Math.hypot(a.re, a.im) - Math.hypot(b.re, b.im) || b.im - a.im)
  ours.forEach(({ re, im }, i) => {
    const size = Math.hypot(answer.re[i]!, answer.im[i]!)
    expect(Math.hypot(re - answer.re[i]!, im - answer.im[i]!) / size).toBeLessThan(1e-9)
  })
  const exp = exponential(flatten(badlyScaled.A), 4, 1e-6)
  // Entries span nine decades; each is held against the largest of its column.
  for (let j = 0; j < 4; j++) {
    const largest = Math.max(...answer.exp.map((row) => Math.abs(row[j]!)))
    for (let i = 0; i < 4; i++) expect(Math.abs(exp[i * 4 + j]! - answer.exp[i]![j]!) / largest).toBeLessThan(1e-12)
  }
})

it.each([0, 2.5e-4])('finds the invariant zeros that SciPy finds, feed-through %s', (d) => {
  const answer = scipy<{ re: number[]; im: number[] }>(
    `
A, b, c, d = np.array(data['A']), np.array(data['b']), np.array(data['c']), data['d']
n = len(A)
pencil = np.block([[A, b[:, None]], [c[None, :], np.array([[d]])]])
mass = np.zeros((n + 1, n + 1)); mass[:n, :n] = np.eye(n)
values = scipy.linalg.eigvals(pencil, mass, homogeneous_eigvals=True)
finite = [a / b for a, b in zip(*values) if abs(b) > 1e-14 * abs(a)]
finite = sorted(finite, key=lambda v: abs(v))
answer = {'re': [v.real for v in finite], 'im': [v.imag for v in finite]}`,
    { ...badlyScaled, d },
  )
  const ours = invariantZeros(badlyScaled.A, badlyScaled.b, badlyScaled.c, d).sort(
    (a, b) => Math.hypot(a.re, a.im) - Math.hypot(b.re, b.im),
  )
  expect(ours).toHaveLength(answer.re.length)
  ours.forEach(({ re }, i) => expectRelative(re, answer.re[i]!, 1e-6))
})

it('puts zeros where the transfer function vanishes', () => {
  // (s + 3)(s + 70)/((s + 1)(s + 20)(s + 400)) in controllable form; the definition is the check.
  const A = [
    [-421, -8420, -8000],
    [1, 0, 0],
    [0, 1, 0],
  ]
  const zeros = invariantZeros(A, [1, 0, 0], [1, 73, 210], 0)
    .map(({ re }) => re)
    .sort((a, b) => b - a)
  expectRelative(zeros[0]!, -3, 1e-12)
  expectRelative(zeros[1]!, -70, 1e-12)
})

it('e^(A·(s + t)) is e^(A·s)·e^(A·t) for every matrix', () => {
  const entry = fc.double({ min: -1e3, max: 1e3, noNaN: true })
  fc.assert(
    fc.property(
      fc.array(entry, { minLength: 9, maxLength: 9 }),
      fc.double({ min: 1e-6, max: 1e-2, noNaN: true }),
      (values, t) => {
        const A = Float64Array.from(values)
        const whole = exponential(A, 3, 2 * t)
        const half = exponential(A, 3, t)
        const largest = Math.max(...whole.map(Math.abs))
        for (let i = 0; i < 3; i++) {
          for (let j = 0; j < 3; j++) {
            const product = [0, 1, 2].reduce((sum, k) => sum + half[i * 3 + k]! * half[k * 3 + j]!, 0)
            // e^A's own condition grows with the norm, here up to 60.
            const growth = Math.max(...half.map(Math.abs)) ** 2
            expect(Math.abs(product - whole[i * 3 + j]!)).toBeLessThanOrEqual(1e-11 * Math.max(largest, growth))
          }
        }
      },
    ),
  )
})

it('finds a root to the last digits and refuses an interval without one', () => {
  expectRelative(
    findRoot((x) => x * x - 2, 0, 2),
    Math.SQRT2,
    4e-16,
  )
  expect(() => findRoot((x) => x * x + 1, -1, 1)).toThrow(RangeError)
})

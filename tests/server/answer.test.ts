import { describe, expect, it } from 'vitest'

import { writeAnswer } from '@/server/presenters/answer'

const read = (json: Uint8Array): unknown => JSON.parse(new TextDecoder().decode(json))

describe('an answer as it is sent', () => {
  it('holds curves to a millionth of a decibel and degree, and every other number in full', () => {
    const answer = {
      frequencies: [1234.567890123456],
      loop: { response: { averaged: [], switched: [{ gainDb: -12.3456789012, phaseDeg: -178.00000049 }] } },
      margins: null,
      crossings: [{ frequency: 1 / 3, gainDb: 1 / 3, phaseDeg: 1 / 3, margin: 1 / 3 }],
    }
    expect(read(writeAnswer(answer))).toEqual({
      ...answer,
      loop: { response: { averaged: [], switched: [{ gainDb: -12.345679, phaseDeg: -178 }] } },
    })
  })

  it.each([
    ['in a curve', { curve: [{ gainDb: NaN, phaseDeg: 0 }] }, 'The answer holds NaN at "gainDb".'],
    ['anywhere else', { margins: { crossover: Infinity } }, 'The answer holds Infinity at "crossover".'],
    ['in a list', { frequencies: [1, -Infinity] }, 'The answer holds -Infinity at "frequencies".'],
  ])('is never sent with a number that is none %s', (_where, answer, message) => {
    expect(() => writeAnswer(answer)).toThrow(message)
  })
})

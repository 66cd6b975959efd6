import { describe, expect, it } from 'vitest'
import { decimalsFor, fixed, quantity, significant, withInterval } from '../../src/report/format.ts'
import { textWidth, wrapText } from '../../src/report/text-width.ts'
import { visible } from '../../src/report/visible.ts'

describe('numbers for people', () => {
  it.each([
    [1.9e-7, 'C', '190 nC'],
    [3.5e8, 'A/us', '350 A/µs'],
    [48, 'V', '48 V'],
    [48.04, 'V', '48.0 V'],
    [0.9995, 'V', '1.00 V'],
    [999.6e-9, 's', '1.00 µs'],
    [4.7e-4, 'F', '470 µF'],
    [2.5, 'C', '2.5 C'],
    [10e3, 'ohm', '10 kΩ'],
    [383.15, 'degC', '110 °C'],
    [-0.2, 'C_', '0 °C'],
    [0.345, '%', '34.5 %'],
    [0, 'W', '0 W'],
    [-0.6, 'W', '-600 mW'],
  ])('shows %d %s as %s', (value, unit, text) => {
    expect(quantity(value, unit)).toBe(text)
  })

  it('shows a missing or non-finite number as absent, never as NaN', () => {
    expect([
      quantity(null, 'W'),
      quantity(Number.NaN, 'W'),
      significant(Number.POSITIVE_INFINITY),
      fixed(Number.NaN, 2),
    ]).toEqual(['–', '–', '–', '–'])
  })

  it('tells exactly zero from what only rounds to zero', () => {
    expect([fixed(0, 2), fixed(0.004, 2), fixed(-0.004, 2), fixed(0.006, 2)]).toEqual(['0', '<0.01', '>-0.01', '0.01'])
  })

  it('gives a figure and its interval one unit and the same decimals', () => {
    expect(withInterval(1.8, -0.6, 3.1, 'W')).toBe('1.80 W (-0.60 to 3.10 W)')
    expect(withInterval(0.012, 0.009, 0.016, 'W')).toBe('12.0 mW (9.0 to 16.0 mW)')
    expect(withInterval(1.8, null, null, 'W')).toBe('1.8 W')
  })

  it('chooses decimals by the largest of a column', () => {
    expect([
      decimalsFor([1234]),
      decimalsFor([123]),
      decimalsFor([12, 0.1]),
      decimalsFor([0.012]),
      decimalsFor([null]),
    ]).toEqual([0, 1, 2, 4, 0])
  })
})

describe('text from files', () => {
  it('loses what could steer a terminal or hide text', () => {
    expect(visible('a\u001B[31mb\u0007\u009Bc\u202Ed\ne\uD800')).toBe('a\uFFFD[31mb\uFFFD\uFFFDc\uFFFDd e\uFFFD')
  })

  it('keeps accents, symbols and other scripts', () => {
    expect(visible('Lärche µΩ 落葉松 🌲')).toBe('Lärche µΩ 落葉松 🌲')
  })

  it('measures wide and combining characters', () => {
    expect([textWidth('abc'), textWidth('落葉'), textWidth('e\u0301'), textWidth('µΩ°')]).toEqual([3, 4, 1, 3])
  })

  it('wraps without losing a character and without tearing a number from its unit', () => {
    expect(wrapText('bring it down to 60 V at once', 20)).toEqual(['bring it down to', '60 V at once'])
    expect(wrapText('alder-200v-8a-ultrafast', 11)).toEqual(['alder-200v-', '8a-', 'ultrafast'])
    expect(wrapText('落葉松落葉松', 5)).toEqual(['落葉', '松落', '葉松'])
  })
})

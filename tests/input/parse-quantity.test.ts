import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { parseQuantity } from '../../src/input/units/parse-quantity.ts'
import { type QuantityKindName, quantityKinds } from '../../src/input/units/quantity-kinds.ts'

/** As people are told it, beside every comma. */
const commaHint = 'write the decimals after a point and leave out thousands separators'

const read = (text: string, kind: QuantityKindName, sign: 'positive' | 'not-negative' | 'any' = 'positive') =>
  parseQuantity(text, { kind, sign })

describe('a quantity as engineers type it', () => {
  it.each<[string, QuantityKindName, number]>([
    ['35 ns', 'time', 35e-9],
    ['90 nC', 'charge', 90e-9],
    ['35ns', 'time', 35e-9],
    ['  35  ns ', 'time', 35e-9],
    ['35\u00a0ns', 'time', 35e-9],
    ['35\u2009ns', 'time', 35e-9],
    ['35\u202fns', 'time', 35e-9],
    ['300 \u212a', 'temperature', 300],
    ['25 \u2103', 'temperature', 298.15],
    ['+35 ns', 'time', 35e-9],
    ['.5 us', 'time', 0.5e-6],
    ['5. us', 'time', 5e-6],
    ['1e-05 V', 'voltage', 1e-5],
    ['100 A/us', 'slope', 1e8],
    ['100 A/\u00b5s', 'slope', 1e8],
    ['100 A/\u03bcs', 'slope', 1e8],
    ['0.1 A/ns', 'slope', 1e8],
    ['22 mohm', 'resistance', 0.022],
    ['22 m\u03a9', 'resistance', 0.022],
    ['22 m\u2126', 'resistance', 0.022],
    ['10 kohm', 'resistance', 1e4],
    ['0.9 K/W', 'thermal_resistance', 0.9],
    ['0.9 degC/W', 'thermal_resistance', 0.9],
    ['0.9 \u00b0C/W', 'thermal_resistance', 0.9],
    ['25 degC', 'temperature', 298.15],
    ['25 \u00b0C', 'temperature', 298.15],
    ['\u221240 \u00b0C', 'temperature', 233.15],
    ['300 K', 'temperature', 300],
    ['80 %', 'share', 0.8],
    ['80%', 'share', 0.8],
    ['0.6 %/K', 'per_kelvin', 0.006],
    ['0.006 /K', 'per_kelvin', 0.006],
    ['0.006 1/K', 'per_kelvin', 0.006],
    ['0.006 1 / K', 'per_kelvin', 0.006],
    ['0.006   1/K', 'per_kelvin', 0.006],
    ['0.6 % / K', 'per_kelvin', 0.006],
    ['0.6 % 1/K', 'per_kelvin', 0.006],
    ['5\tV', 'voltage', 5],
    ['12345 V', 'voltage', 12345],
    ['0012 V', 'voltage', 12],
    ['1.25 V', 'voltage', 1.25],
    ['.25 V', 'voltage', 0.25],
    ['2E3 V', 'voltage', 2000],
    ['2e+3 V', 'voltage', 2000],
    ['12e11 V', 'voltage', 1.2e12],
    ['3 kA', 'current', 3000],
    ['-2 A', 'current', -2],
    ['1e40 V', 'voltage', 1e40],
    ['-1e40 V', 'voltage', -1e40],
    ['1e-40 V', 'voltage', 1e-40],
    ['-1.8 mV/K', 'voltage_per_kelvin', -0.0018],
    ['0.02 mohm/K', 'resistance_per_kelvin', 2e-5],
    ['20 S', 'transconductance', 20],
    ['1200 h', 'hours', 1200],
    ['90 min', 'hours', 1.5],
  ])('"%s" is read as %s', (text, kind, value) => {
    const sign = value < 0 ? 'any' : 'positive'
    expect(Math.abs((read(text, kind, sign) as number) / value - 1)).toBeLessThan(4e-16)
  })

  it.each<[string, QuantityKindName, string, string]>([
    ['48', 'voltage', 'unit-missing', ''],
    ['48 ', 'voltage', 'unit-missing', ''],
    ['0.8', 'share', 'unit-missing', ''],
    ['0,9 K/W', 'thermal_resistance', 'number-decimal-comma', commaHint],
    ['1,200 V', 'voltage', 'number-decimal-comma', commaHint],
    ['0 , 9 K/W', 'thermal_resistance', 'number-decimal-comma', commaHint],
    [',5 V', 'voltage', 'number-malformed', commaHint],
    ['5, V', 'voltage', 'number-malformed', ''],
    ['1 200 V', 'voltage', 'number-malformed', 'one number without spaces in it'],
    ['1  200 V', 'voltage', 'number-malformed', 'one number without spaces in it'],
    ['1 1 V', 'voltage', 'number-malformed', 'one number without spaces in it'],
    ['0.5 12/K', 'per_kelvin', 'number-malformed', 'one number without spaces in it'],
    ['0.5 2/K', 'per_kelvin', 'number-malformed', ''],
    ['0.5 2  /K', 'per_kelvin', 'number-malformed', ''],
    ['0.5 .1/K', 'per_kelvin', 'number-malformed', ''],
    ['0.5. 1/K', 'per_kelvin', 'number-malformed', ''],
    ['e5 V', 'voltage', 'number-malformed', ''],
    ['. V', 'voltage', 'number-malformed', ''],
    ['5e V', 'voltage', 'unit-unknown', ''],
    ['5e2.5 V', 'voltage', 'number-malformed', ''],
    ['1.2.3 V', 'voltage', 'number-malformed', ''],
    ['1.2.3,4 V', 'voltage', 'number-malformed', ''],
    ['1.2.3 4 V', 'voltage', 'number-malformed', ''],
    ['about 5 V', 'voltage', 'number-malformed', ''],
    ['', 'voltage', 'number-malformed', ''],
    ['- 5 V', 'voltage', 'number-malformed', ''],
    ['NaN V', 'voltage', 'number-malformed', ''],
    ['Infinity V', 'voltage', 'number-malformed', ''],
    [`${'1'.repeat(120)} V`, 'voltage', 'number-malformed', ''],
    ['1e400 V', 'voltage', 'number-not-finite', ''],
    ['1e50 V', 'voltage', 'number-out-of-range', 'check the unit'],
    ['1e-50 V', 'voltage', 'number-out-of-range', 'check the unit'],
    ['1e-400 V', 'voltage', 'number-out-of-range', 'check the unit'],
    ['0 V', 'voltage', 'number-zero', ''],
    ['-5 V', 'voltage', 'number-negative', ''],
    ['\u22125 V', 'voltage', 'number-negative', ''],
    ['-300 degC', 'temperature', 'number-out-of-range', ''],
    ['0 K', 'temperature', 'number-out-of-range', ''],
    ['100 khz', 'frequency', 'unit-unknown', 'did you mean "kHz"?'],
    ['100 KHZ', 'frequency', 'unit-unknown', 'did you mean "kHz"?'],
    ['22 Ohm', 'resistance', 'unit-unknown', 'did you mean "ohm"?'],
    ['5 VA', 'power', 'unit-unknown', ''],
    ['5 %V', 'voltage', 'unit-unknown', 'did you mean "V" or "mV"?'],
    ['5 % V', 'voltage', 'unit-unknown', ''],
    ['80 %%', 'share', 'unit-unknown', 'did you mean "%"?'],
    ['0.5 1/', 'per_kelvin', 'unit-unknown', ''],
    ['0.5 K 1/K', 'per_kelvin', 'unit-unknown', ''],
    ['77 degF', 'temperature', 'unit-unknown', 'did you mean "degC"?'],
    ['5 __proto__', 'time', 'unit-unknown', ''],
    ['5 constructor', 'time', 'unit-unknown', ''],
    ['5 V)', 'voltage', 'unit-unknown', 'did you mean "V"?'],
    ['80 percent', 'share', 'unit-unknown', ''],
    ['35 nS', 'time', 'unit-dimension', '"nS" makes it a transconductance'],
    ['25 C', 'temperature', 'unit-dimension', '"C" makes it a charge'],
    ['35 kg', 'time', 'unit-dimension', '"kg" makes it a quantity of another kind'],
    ['80 V', 'share', 'unit-dimension', '"V" makes it a voltage'],
    ['0.6 %', 'per_kelvin', 'unit-dimension', '"%" makes it a plain ratio'],
    ['80 %/K', 'share', 'unit-dimension', '"%/K" makes it a relative change per kelvin'],
    ['5 V A', 'voltage', 'unit-dimension', '"V A" makes it a power'],
  ])('"%s" as %s is refused: %s', (text, kind, code, hint) => {
    expect(read(text, kind)).toMatchObject({ refused: true, code, hint })
  })

  it('rounds once: a whole number of a smaller unit is the double nearest to it', () => {
    const prefixes = [
      ['m', 3],
      ['u', 6],
      ['n', 9],
      ['p', 12],
    ] as const
    for (const [prefix, digits] of prefixes) {
      for (let n = 1; n <= 300; n++) expect(read(`${n} ${prefix}s`, 'time')).toBe(Number(`${n}e-${digits}`))
    }
    for (let n = 1; n <= 300; n++) {
      expect(read(`${n} %`, 'share')).toBe(n / 100)
      expect(read(`${n} %/K`, 'per_kelvin')).toBe(n / 100)
      expect(read(`${n} min`, 'hours')).toBe(n / 60)
      expect(read(`${n} kHz`, 'frequency')).toBe(n * 1000)
    }
  })

  it('looks at a hundred signs and no more', () => {
    const padded = (length: number) => `${'0'.repeat(length - 3)}5 V`
    expect(read(padded(100), 'voltage')).toBe(5)
    expect(read(` ${padded(99)}`, 'voltage')).toBe(5)
    expect(read(padded(101), 'voltage')).toMatchObject({ code: 'number-malformed', hint: '' })
    expect(read(`${' '.repeat(98)}5 V`, 'voltage')).toMatchObject({ code: 'number-malformed' })
    // written out, the degree sign is longer
    expect(read(`${'0'.repeat(94)}25 \u00b0C`, 'temperature')).toMatchObject({ code: 'number-malformed' })
  })

  it('names the limits of what it takes', () => {
    const magnitudes = {
      code: 'number-out-of-range',
      expected: 'magnitudes from 1e-40 to 1e40',
      hint: 'check the unit',
    }
    for (const text of ['1.0001e40 V', '-1.0001e40 V', '0.9999e-40 V', '-0.9999e-40 V'])
      expect(read(text, 'voltage', 'any'), text).toMatchObject(magnitudes)
    expect(read('-274 degC', 'temperature', 'any')).toMatchObject({
      refused: true,
      code: 'number-out-of-range',
      expected: 'a temperature above absolute zero, -273.15 degC',
      hint: '',
    })
  })

  it('takes a zero for a zero, however many digits and whatever exponent it has', () => {
    for (const text of ['0 V', '0.000 V', '0e9 V', '0E-99 V', '-.0 V', '0 kV']) {
      expect(Object.is(read(text, 'voltage', 'any'), 0), text).toBe(true)
      expect(read(text, 'voltage', 'positive'), text).toMatchObject({ code: 'number-zero', hint: '' })
    }
    expect(read('0.001e-50 V', 'voltage', 'any')).toMatchObject({ code: 'number-out-of-range' })
    expect(read('1e-400 V', 'voltage', 'any')).toMatchObject({ code: 'number-out-of-range' })
  })

  it('remembers of a unit neither the kind nor the number it stood with', () => {
    for (let round = 0; round < 2; round++) {
      expect(read('5 S', 'transconductance')).toBe(5)
      expect(read('5 S', 'time')).toMatchObject({ code: 'unit-dimension' })
      expect(read('60 min', 'time')).toBe(3600)
      expect(read('60 min', 'hours')).toBe(1)
      expect(read('30 min', 'hours')).toBe(0.5)
    }
  })

  it('takes zero where it makes sense, and never a negative zero', () => {
    expect(Object.is(read('0 W', 'power', 'not-negative'), 0)).toBe(true)
    expect(Object.is(read('-0 W', 'power', 'not-negative'), 0)).toBe(true)
  })

  it('names the kind and an example in what is expected', () => {
    expect(read('48', 'voltage')).toMatchObject({ expected: 'a voltage such as "48 V"' })
  })

  it('has examples and proposals that it reads itself, for every kind', () => {
    for (const [kind, { example, units }] of Object.entries(quantityKinds)) {
      for (const text of [example, ...units.map((unit) => `3 ${unit}`)]) {
        expect(read(text, kind as QuantityKindName, 'any'), `${kind}: ${text}`).toBeTypeOf('number')
      }
    }
  })

  it('reads back what it writes, in every unit that it proposes', () => {
    const kinds = Object.entries(quantityKinds)
    const anyUnit = fc.constantFrom(...kinds.flatMap(([kind, { units }]) => units.map((unit) => [kind, unit] as const)))
    fc.assert(
      fc.property(anyUnit, fc.double({ min: 1e-3, max: 1e6, noNaN: true }), ([kind, unit], number) => {
        const once = read(`${number} ${unit}`, kind as QuantityKindName) as number
        const one = read(`1 ${unit}`, kind as QuantityKindName) as number
        const zero = unit === 'degC' ? 273.15 : 0
        expect(Math.abs((once - zero) / (one - zero) / number - 1)).toBeLessThan(kind === 'temperature' ? 1e-9 : 1e-15)
      }),
    )
  })

  it('takes time in proportion to the length of any text', () => {
    for (const sign of ['1', ' ', '-', 'e', '%', '/', '(', ',', '\u00b5', '1e', '. ']) {
      const before = performance.now()
      read(sign.repeat(1_000_000), 'voltage')
      expect(performance.now() - before).toBeLessThan(1000)
    }
  })
})

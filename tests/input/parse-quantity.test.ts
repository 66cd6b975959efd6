import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { parseQuantity } from '../../src/input/units/parse-quantity.ts'
import { type QuantityKindName, quantityKinds } from '../../src/input/units/quantity-kinds.ts'

const read = (text: string, kind: QuantityKindName, sign: 'positive' | 'not-negative' | 'any' = 'positive') =>
  parseQuantity(text, { kind, sign })

describe('a quantity as engineers type it', () => {
  it.each<[string, QuantityKindName, number]>([
    ['35 ns', 'time', 35e-9],
    ['90 nC', 'charge', 90e-9],
    ['35ns', 'time', 35e-9],
    ['  35  ns ', 'time', 35e-9],
    ['35\u00a0ns', 'time', 35e-9],
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
    [
      '0,9 K/W',
      'thermal_resistance',
      'number-decimal-comma',
      'write the decimals after a point and leave out thousands separators',
    ],
    [
      '1,200 V',
      'voltage',
      'number-decimal-comma',
      'write the decimals after a point and leave out thousands separators',
    ],
    ['1 200 V', 'voltage', 'number-malformed', 'one number without spaces in it'],
    ['1.2.3 V', 'voltage', 'number-malformed', ''],
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
  ])('"%s" as %s is refused: %s', (text, kind, code, hint) => {
    expect(read(text, kind)).toMatchObject({ refused: true, code, hint })
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

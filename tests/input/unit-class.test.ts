import * as mathjs from 'mathjs'
import { describe, expect, it } from 'vitest'
import { convertUnit } from '../../src/input/units/unit-class.ts'

interface UnitOfMathjs {
  readonly dimensions: readonly number[]
  toNumber(unit: string): number
}
const table = (mathjs.Unit as unknown as { readonly UNITS: Readonly<Record<string, { readonly prefixes: object }>> })
  .UNITS
const baseUnits = ['kg', 'm', 's', 'A', 'K', 'cd', 'mol', 'rad', 'b']
/** Other temperature scales, prefixes before degC and volt-amperes are refused on purpose; VAR is complex in mathjs. */
const refused = /(degF|fahrenheit|degR|rankine|VAR?|.degC|.celsius)$/

const everyUnit = Object.entries(table)
  .flatMap(([name, { prefixes }]) => Object.keys(prefixes).map((prefix) => `${prefix}${name}`))
  .filter((text) => !refused.test(text) && text.length <= 32)

function theirs(text: string): UnitOfMathjs {
  return mathjs.unit(`1 ${text}`) as unknown as UnitOfMathjs
}

function baseOf({ dimensions }: UnitOfMathjs): string {
  return dimensions.flatMap((power, index) => (power === 0 ? [] : [`${baseUnits[index]}^${power}`])).join(' ')
}

describe('the unit table with plain arithmetic', () => {
  it('gives what the whole of mathjs gives, for every unit with every prefix', () => {
    expect(everyUnit.length).toBeGreaterThan(2500)
    const different = everyUnit.filter((text) => {
      const reference = theirs(text)
      const base = baseOf(reference)
      const ours = convertUnit(text, base)
      const expected = reference.toNumber(base)
      return 'refused' in ours || Math.abs(ours.factor + ours.offset - expected) > 1e-12 * Math.abs(expected)
    })
    expect(different).toEqual([])
  })

  it.each(['degF', 'degR', 'VA', 'VAR', 'kVA', 'mdegC', 'K/degF'])('does not take "%s"', (text) => {
    expect(convertUnit(text, text === 'mdegC' ? 'K' : 'W')).toEqual({ refused: 'unknown' })
  })

  it('tells another dimension from an unknown unit', () => {
    expect(convertUnit('ns', 'V')).toMatchObject({ refused: 'dimension' })
    expect(convertUnit('nsx', 'V')).toEqual({ refused: 'unknown' })
    expect(convertUnit('V'.repeat(40), 'V')).toEqual({ refused: 'unknown' })
    expect(convertUnit('', 'V')).toEqual({ refused: 'unknown' })
  })

  it('reads 32 signs of a unit and no more', () => {
    const rest = `ohm${'/V'.repeat(7)}${'*V'.repeat(7)}`
    expect(rest).toHaveLength(31)
    expect(convertUnit(`k${rest}`, 'ohm')).toEqual({ factor: 1000, offset: 0 })
    expect(convertUnit('daohm', 'ohm')).toEqual({ factor: 10, offset: 0 })
    expect(convertUnit(`da${rest}`, 'ohm')).toEqual({ refused: 'unknown' })
  })

  it('does not take a unit whose size is no number', () => {
    expect(convertUnit('kV^2/V', 'V')).toEqual({ factor: 1e6, offset: 0 })
    expect(convertUnit('kV^200/V^199', 'V')).toEqual({ refused: 'unknown' })
    expect(convertUnit('mV^200/V^199', 'V')).toEqual({ refused: 'unknown' })
  })

  it('turns kelvin into degrees Celsius as well as back', () => {
    expect(convertUnit('degC', 'K')).toEqual({ factor: 1, offset: 273.15 })
    expect(convertUnit('K', 'degC')).toMatchObject({ factor: 1, offset: -273.15 })
  })
})

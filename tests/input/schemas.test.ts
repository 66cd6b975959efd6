import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { readStage } from '../../src/input/read-stage.ts'
import { parseQuantity } from '../../src/input/units/parse-quantity.ts'
import { type QuantityKindName, quantityKinds } from '../../src/input/units/quantity-kinds.ts'
import { smallStage } from './samples.ts'

interface Schema {
  readonly type?: string | readonly string[]
  readonly description?: string
  readonly default?: unknown
  readonly examples?: readonly string[]
  readonly properties?: Readonly<Record<string, Schema>>
  readonly items?: Schema
  readonly $ref?: string
  readonly $defs?: Readonly<Record<string, Schema>>
  readonly 'x-quantity'?: string
}
const load = (name: string): Schema => JSON.parse(readFileSync(`schemas/${name}.schema.json`, 'utf8'))
const names = ['stage', 'rectifier', 'mapping']

/** Every property of a schema with its path. */
function properties(schema: Schema, path = ''): readonly (readonly [string, Schema])[] {
  const inside = Object.entries(schema.properties ?? {}).flatMap(([key, child]) => {
    const at = path === '' ? key : `${path}.${key}`
    return [[at, child] as const, ...properties(child, at)]
  })
  return schema.items === undefined ? inside : [...inside, ...properties(schema.items, `${path}[]`)]
}

describe.each(names)('the %s schema', (name) => {
  const schema = load(name)

  it('describes every key, so that an editor can help', () => {
    const all = [schema, ...Object.values(schema.$defs ?? {})].flatMap((part) => properties(part))
    expect(all.length).toBeGreaterThan(5)
    expect(all.filter(([, part]) => (part.description ?? part.$ref ?? '') === '').map(([path]) => path)).toEqual([])
  })

  it('names kinds of quantities that the program has, with examples that it reads', () => {
    for (const [key, part] of Object.entries(schema.$defs ?? {})) {
      if (part.type !== 'string') continue
      expect(part['x-quantity'], key).toBe(key)
      expect(Object.keys(quantityKinds)).toContain(key)
      for (const example of part.examples ?? []) {
        expect(parseQuantity(example, { kind: key as QuantityKindName, sign: 'any' }), `${key}: ${example}`).toBeTypeOf(
          'number',
        )
      }
    }
  })
})

it('the defaults that the stage schema states are those that the program takes', () => {
  const mains = smallStage
    .replace('stage: buck', 'stage: mains-boost')
    .replace('{voltage: 48 V}', '{mains: 230 V}')
    .replace('12 V', '400 V')
  const gate =
    'gate: {drive: 12 V, resistance: 4 ohm, input_capacitance: 1 nF, transconductance: 20 A/V, threshold: 3 V}'
  const turnOn = 'turn_on: {energy: 1 uJ, current: 1 A, voltage: 1 V}'
  const texts = [
    `${mains}switch: {voltage_fall: 20 ns}\n`,
    `${smallStage}switch: {${gate}, ${turnOn}}\nparallel: {parts: 2}\n`,
  ]
  const assumed = texts.flatMap((text) => readStage(text, 'file').value!.stage.assumed)
  const taken = new Map(assumed.map(({ path, value }) => [path, value]))
  const stated = properties(load('stage')).flatMap(([path, part]) =>
    part.default === undefined ? [] : [[path, part.default] as const],
  )
  expect(stated.length).toBeGreaterThan(10)
  expect(stated.map(([path]) => [path, taken.get(path)])).toEqual(stated.map(([path, value]) => [path, value]))
})

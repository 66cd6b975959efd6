import { readdirSync, readFileSync } from 'node:fs'
import fc, { type Arbitrary } from 'fast-check'
import type { FuzzCase } from './fuzz-case.ts'
import { mutated } from './mutations.ts'
import { rankOptions, swapOptions, trendOptions } from './random-options.ts'

const demo = 'catalogs-demo'
const read = (path: string): string => readFileSync(`${demo}/${path}`, 'utf8')
const yamlOf = (folder: string): readonly string[] =>
  readdirSync(`${demo}/${folder}`)
    .filter((name) => name.endsWith('.yaml'))
    .map((name) => `${folder}/${name}`)

const recordTexts = yamlOf('rectifiers').map((path) => ({ path, text: read(path) }))

interface Shelf {
  readonly path: string
  readonly files: Readonly<Record<string, string>>
  readonly ids: readonly string[]
}

/** A demonstration stage with no more of the shelf than it names: at most six parts, so that many cases fit in a minute. */
function shelfOf(path: string): Shelf {
  const text = read(path)
  const named = /^candidates: \[(.*)\]/m.exec(text)?.[1]?.split(', ')
  const wanted = named ?? ['alder-200v-16a', 'cedar-200v-20a', 'sorrel-600v-8a-soft']
  const parts = recordTexts.filter((record) => wanted.some((id) => record.text.includes(`id: ${id}\n`)))
  const files = Object.fromEntries(parts.map((record) => [record.path, record.text]))
  return { path, files: { ...files, [path]: text }, ids: wanted }
}

const shelves = yamlOf('stages').map(shelfOf)

/** One file of a demonstration, mutated, and a study over it. */
export const mutatedStudy: Arbitrary<FuzzCase> = fc.constantFrom(...shelves).chain(({ path, files, ids }) =>
  fc
    .oneof(
      { weight: 2, arbitrary: fc.constant(path) },
      { weight: 3, arbitrary: fc.constantFrom(...Object.keys(files)) },
    )
    .chain((target) =>
      fc
        .tuple(mutated(files[target]!), fc.oneof(rankOptions, trendOptions, swapOptions(ids)))
        .map(([bytes, { command, options }]) => ({
          kind: `mutated ${target === path ? 'stage' : 'record'}`,
          files: { ...files, [target]: bytes },
          command,
          operands: [path],
          options,
        })),
    ),
)

const captures = yamlOf('captures').map((path) => {
  const text = read(path)
  const names = [...text.matchAll(/^(?:file|reference): (\S+)/gm)].map((match) => match[1]!)
  return {
    path,
    files: {
      [path]: text,
      ...Object.fromEntries(names.map((name) => [`captures/${name}`, shorter(read(`captures/${name}`))])),
    },
  }
})

/** Every second sample does, and takes half the time. */
function shorter(text: string): string {
  const lines = text.split('\n')
  return lines.filter((_, index) => index < 12 || index % 2 === 0).join('\n')
}

const reduceOptions = fc.record({ json: fc.boolean(), strict: fc.boolean() })

export const mutatedCapture: Arbitrary<FuzzCase> = fc.constantFrom(...captures).chain(({ path, files }) =>
  fc.constantFrom(...Object.keys(files)).chain((target) =>
    fc.tuple(mutated(files[target as keyof typeof files]!), reduceOptions).map(([bytes, options]) => ({
      kind: target === path ? 'mutated settings' : 'mutated samples',
      files: { ...files, [target]: bytes },
      command: 'reduce',
      operands: [path],
      options,
    })),
  ),
)

const shop = {
  'shop/price-list.csv': read('shop/price-list.csv'),
  'shop/price-list.yaml': read('shop/price-list.yaml'),
}
const shopStage = `${read('stages/quick-estimate.yaml').replace('records: [../rectifiers]', 'records: [../shop/price-list.csv]')}`
const shopFiles = { ...shop, 'stages/shop.yaml': shopStage }

/** A catalogue in CSV, its mapping or the stage, mutated. */
export const mutatedCatalogue: Arbitrary<FuzzCase> = fc.constantFrom(...Object.keys(shopFiles)).chain((target) =>
  fc.tuple(mutated(shopFiles[target as keyof typeof shopFiles]), rankOptions).map(([bytes, { command, options }]) => ({
    kind: 'mutated catalogue',
    files: { ...shopFiles, [target]: bytes },
    command,
    operands: ['stages/shop.yaml'],
    options: { ...options, draws: 5, mapping: 'shop/price-list.yaml' },
  })),
)

const profile = 'hours [h],load [%],ambient [degC],input [V]\n1200,100,45,48\n1800,60,40,46\n2400,30,30,50\n'
const profileShelf = shelves.find(({ path }) => path.endsWith('pump-boost.yaml'))!
const profileStage = profileShelf.files[profileShelf.path]!.replace(
  /duty_profile:\n(?: {2}-.*\n)+/,
  'duty_profile: {file: profile.csv}\n',
)

export const mutatedProfile: Arbitrary<FuzzCase> = fc
  .tuple(mutated(profile), rankOptions)
  .map(([bytes, { command, options }]) => ({
    kind: 'mutated profile',
    files: { ...profileShelf.files, [profileShelf.path]: profileStage, 'stages/profile.csv': bytes },
    command,
    operands: [profileShelf.path],
    options,
  }))

const everyText = [...yamlOf('stages'), ...yamlOf('rectifiers'), ...yamlOf('captures'), 'shop/price-list.yaml'].map(
  read,
)

/** Any demonstration file, mutated, for `check`. */
export const mutatedCheck: Arbitrary<FuzzCase> = fc
  .tuple(fc.constantFrom(...everyText).chain(mutated), fc.boolean())
  .map(([bytes, json]) => ({
    kind: 'mutated check',
    files: { 'any.yaml': bytes },
    command: 'check',
    operands: ['any.yaml'],
    options: { json },
  }))

const anything = fc.oneof(
  fc.uint8Array({ maxLength: 300 }),
  fc.string({ unit: 'binary', maxLength: 200 }),
  fc.string({
    unit: fc.constantFrom('[', '{', '- ', 'a: ', '? ', '"', "'", '&a', '*a', '!', '%', '|', '>', '\n', ' ', '\t'),
    maxLength: 80,
  }),
)

/** Bytes and characters of no meaning. */
export const noise: Arbitrary<FuzzCase> = fc
  .tuple(anything, fc.constantFrom('check' as const, 'rank' as const, 'reduce' as const), fc.boolean())
  .map(([bytes, command, json]) => ({
    kind: 'noise',
    files: { 'any.yaml': bytes },
    command,
    operands: ['any.yaml'],
    options: command === 'rank' ? { json, seed: 1, draws: 10 } : { json },
  }))

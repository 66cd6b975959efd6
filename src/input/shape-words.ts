import { type QuantityKindName, quantityKinds, wantedQuantity } from './units/quantity-kinds.ts'

type SchemaPart = Readonly<Record<string, unknown>>

/** The kind of quantity that a definition stands for: its `x-quantity`. */
export function kindOfDefinition(schema: SchemaPart | undefined): QuantityKindName | null {
  return asKind(schema?.['x-quantity'])
}

function asKind(name: unknown): QuantityKindName | null {
  return typeof name === 'string' && Object.hasOwn(quantityKinds, name) ? (name as QuantityKindName) : null
}

/** What a part of a schema asks for, in words. */
export function expectedBySchema(schema: unknown): string {
  const {
    $ref,
    enum: words,
    description,
  } = (schema ?? {}) as {
    readonly $ref?: string
    readonly enum?: readonly unknown[]
    readonly description?: string
  }
  const kind = asKind($ref?.replace('#/$defs/', ''))
  if (kind !== null) return wantedQuantity(kind)
  if (words !== undefined) return `one of ${words.join(', ')}`
  const sentence = (description ?? 'a value').replace(/\.$/, '')
  // An abbreviation keeps its capitals: CSV.
  return /^[A-Z][A-Z]/.test(sentence) ? sentence : sentence.slice(0, 1).toLowerCase() + sentence.slice(1)
}

const typeWords: Readonly<Record<string, string>> = {
  string: 'text',
  object: 'a group of keys',
  array: 'a list',
  boolean: 'true or false',
  integer: 'a whole number',
  number: 'a plain number',
}

/** "a list or a group of keys". */
export function wordsOfTypes(types: unknown): string {
  const list = Array.isArray(types) ? types : [types]
  return list.map((type) => typeWords[String(type)] ?? String(type)).join(' or ')
}

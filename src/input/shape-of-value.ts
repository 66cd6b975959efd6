import type { SchemaError } from '#validators'
import { didYouMean } from '../problems/nearest.ts'
import { shown } from '../problems/shown.ts'
import type { ShapeFault } from './shape-fault.ts'
import { kindOfDefinition, wordsOfTypes } from './shape-words.ts'
import { wantedQuantity } from './units/quantity-kinds.ts'
import type { Path } from './yaml/path.ts'

/** A value that the schema does not take: its type, its word, its bounds. */
export function valueProblem(path: Path, value: unknown, error: SchemaError): ShapeFault {
  const at = { path, at: path, of: 'value', found: shown(value) } as const
  switch (error.keyword) {
    case 'type':
      return { ...at, ...wrongType(value, error) }
    case 'enum': {
      const words = error.params.allowedValues as readonly string[]
      return { ...at, code: 'word-unknown', expected: words.join(', '), hint: wordHint(value, words) }
    }
    case 'minItems':
    case 'maxItems':
      return {
        ...at,
        code: 'list-length',
        found: `${(value as readonly unknown[]).length} entries`,
        expected: bound(error),
        hint: '',
      }
    case 'minimum':
    case 'maximum':
    case 'exclusiveMinimum':
    case 'exclusiveMaximum':
      return { ...at, code: 'number-out-of-range', expected: bound(error), hint: '' }
    default:
      return { ...at, code: 'value-kind', found: `"${shown(value)}"`, expected: textWords(error), hint: '' }
  }
}

function wrongType(
  value: unknown,
  error: SchemaError,
): Pick<ShapeFault, 'code' | 'expected' | 'hint'> & { found?: string } {
  const kind = kindOfDefinition(error.parentSchema)
  if (kind !== null && typeof value === 'number')
    return { code: 'unit-missing', expected: wantedQuantity(kind), hint: '' }
  const expected = kind === null ? wordsOfTypes(error.params.type) : wantedQuantity(kind)
  const found = typeof value === 'object' ? shown(value) : `"${shown(value)}"`
  return { code: 'value-kind', found, expected, hint: typeHint(value, error.params.type) }
}

function typeHint(value: unknown, type: unknown): string {
  if (type === 'array' && typeof value === 'string') return 'write [one, two]'
  if ((type === 'number' || type === 'integer') && typeof value === 'string' && /^[\d.]+$/.test(value))
    return 'leave the quotes out'
  return ''
}

function wordHint(value: unknown, words: readonly string[]): string {
  if (typeof value === 'boolean' && words.includes('yes')) return `write ${value ? 'yes' : 'no'}`
  return typeof value === 'string' ? didYouMean(value, words) : ''
}

function bound({ keyword, params }: SchemaError): string {
  const words: Readonly<Record<string, string>> = {
    minItems: 'at least',
    maxItems: 'at most',
    minimum: 'at least',
    maximum: 'at most',
    exclusiveMinimum: 'more than',
    exclusiveMaximum: 'less than',
  }
  return `${words[keyword]} ${params.limit}`
}

function textWords({ keyword, params }: SchemaError): string {
  if (keyword === 'minLength') return 'text that is not empty'
  if (keyword === 'maxLength') return `text of at most ${params.limit} characters`
  return 'text without control characters'
}

import type { SchemaError, Validator } from '#validators'
import { didYouMean, nearestWords } from '../problems/nearest.ts'
import type { Problem } from '../problems/problem.ts'
import { shown } from '../problems/shown.ts'
import { mergeCommas } from './decimal-commas.ts'
import type { ShapeFault } from './shape-fault.ts'
import { valueProblem } from './shape-of-value.ts'
import { expectedBySchema } from './shape-words.ts'
import { type Path, pathText } from './yaml/path.ts'
import type { YamlFile } from './yaml/read-yaml.ts'

/** What the schema finds wrong with the data, as problems with places; everything at once. */
export function checkShape(yaml: YamlFile, validate: Validator<unknown>): readonly Problem[] {
  if (validate(yaml.data)) return []
  const errors = withoutMisspelt(withoutPairs(yaml.data, validate.errors ?? []))
  const faults = mergeCommas(
    yaml.data,
    errors.flatMap((error) => faultOf(yaml.data, error)),
  )
  const told = new Map(faults.map((fault) => [`${pathText(fault.path)} ${pathText(fault.at)} ${fault.code}`, fault]))
  return [...told.values()].map(({ at, of, path, ...fault }) => ({
    ...fault,
    file: yaml.file,
    path: pathText(path),
    ...yaml.place(at, of),
  }))
}

function faultOf(data: unknown, error: SchemaError): readonly ShapeFault[] {
  const path = pathOf(data, error.instancePath)
  switch (error.keyword) {
    case 'if':
      return []
    case 'required':
    case 'dependentRequired':
      return error.schemaPath.includes('/anyOf/') ? [] : [missingKey(path, error)]
    case 'anyOf':
      return [missingOneOf(path, error)]
    case 'additionalProperties':
      return [unknownKey(path, error)]
    case 'not':
      return [keyNotHere(path, error)]
    default:
      return [valueProblem(path, valueAt(data, path), error)]
  }
}

function missingKey(path: Path, error: SchemaError): ShapeFault {
  const key = String(error.params.missingProperty)
  const because = error.params.property === undefined ? '' : `"${error.params.property}" needs it`
  const properties = error.parentSchema?.properties as Readonly<Record<string, unknown>> | undefined
  const expected = expectedBySchema(properties?.[key])
  return { code: 'key-missing', path: [...path, key], at: path, of: 'key', found: '', expected, hint: because }
}

function missingOneOf(path: Path, error: SchemaError): ShapeFault {
  const alternatives = (error.schema as readonly { readonly required: readonly string[] }[]).flatMap(
    (one) => one.required,
  )
  const expected = `one of ${alternatives.join(', ')}`
  return { code: 'key-missing', path: [...path, alternatives[0]!], at: path, of: 'key', found: '', expected, hint: '' }
}

function unknownKey(path: Path, error: SchemaError): ShapeFault {
  const key = String(error.params.additionalProperty)
  const known = Object.keys((error.parentSchema?.properties as object | undefined) ?? {})
  const hint = /^\d/.test(key) ? 'if a decimal comma stands before it, write a point' : didYouMean(key, known)
  return {
    code: 'key-unknown',
    path,
    at: [...path, key],
    of: 'key',
    found: shown(key),
    expected: known.join(', '),
    hint,
  }
}

function keyNotHere(path: Path, error: SchemaError): ShapeFault {
  const expected = String(error.parentSchema?.description ?? '')
  return { code: 'key-not-here', path, at: path, of: 'key', found: String(path.at(-1) ?? ''), expected, hint: '' }
}

/** Two keys that exclude each other each complain about the other: only the one that comes last in the file is told. */
function withoutPairs(data: unknown, errors: readonly SchemaError[]): readonly SchemaError[] {
  const isPair = (error: SchemaError) => error.keyword === 'not' && error.schemaPath.includes('/dependentSchemas/')
  const parentOf = (error: SchemaError) => error.instancePath.slice(0, error.instancePath.lastIndexOf('/'))
  const last = new Map<string, SchemaError>()
  for (const error of errors.filter(isPair)) {
    const parent = parentOf(error)
    const order = Object.keys((valueAt(data, pathOf(data, parent)) as object | null) ?? {})
    const rank = (one: SchemaError) => order.indexOf(String(pathOf(data, one.instancePath).at(-1)))
    const other = last.get(parent)
    if (other === undefined || rank(error) > rank(other)) last.set(parent, error)
  }
  return errors.filter((error) => !isPair(error) || last.get(parentOf(error)) === error)
}

/** A key that is missing because it stands there misspelt is told once, where it stands. */
function withoutMisspelt(errors: readonly SchemaError[]): readonly SchemaError[] {
  const meant = new Set(
    errors
      .filter(({ keyword }) => keyword === 'additionalProperties')
      .flatMap(({ instancePath, params, parentSchema }) => {
        const known = Object.keys((parentSchema?.properties as object | undefined) ?? {})
        return nearestWords(String(params.additionalProperty), known).map((key) => `${instancePath} ${key}`)
      }),
  )
  return errors.filter(({ keyword, instancePath, params, schema }) => {
    if (keyword === 'required') return !meant.has(`${instancePath} ${params.missingProperty}`)
    if (keyword !== 'anyOf') return true
    const alternatives = (schema as readonly { readonly required: readonly string[] }[]).flatMap((one) => one.required)
    return !alternatives.some((key) => meant.has(`${instancePath} ${key}`))
  })
}

/** "/recovery/1/slope" as keys and positions; a step is a position where the data hold a list. */
function pathOf(data: unknown, pointer: string): Path {
  const path: (string | number)[] = []
  let value = data
  for (const step of pointer.split('/').slice(1)) {
    const key = step.replaceAll('~1', '/').replaceAll('~0', '~')
    path.push(Array.isArray(value) ? Number(key) : key)
    value = child(value, path.at(-1)!)
  }
  return path
}

function valueAt(data: unknown, path: Path): unknown {
  return path.reduce<unknown>(child, data)
}

function child(value: unknown, step: string | number): unknown {
  return typeof value === 'object' && value !== null ? (value as Readonly<Record<string, unknown>>)[step] : undefined
}

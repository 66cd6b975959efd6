import type { AssumedInput } from '../domain/stage.ts'
import type { Problem, ProblemCode } from '../problems/problem.ts'
import { shown } from '../problems/shown.ts'
import { unusualBecause } from './plausible-ranges.ts'
import { parseQuantity } from './units/parse-quantity.ts'
import type { QuantityKindName, QuantitySign } from './units/quantity-kinds.ts'
import { type Path, pathText } from './yaml/path.ts'
import type { YamlFile } from './yaml/read-yaml.ts'

/** One file while it is read: problems, warnings and assumed values collect here. */
export interface Reader {
  readonly yaml: YamlFile
  readonly problems: Problem[]
  readonly warnings: Problem[]
  readonly assumed: AssumedInput[]
}

/** A group of keys inside a file. The shape is checked already; what did not fit the shape reads as absent. */
export interface Section {
  readonly reader: Reader
  readonly data: Readonly<Record<string, unknown>>
  readonly path: Path
}

export function startReader(yaml: YamlFile): Reader {
  return { yaml, problems: [], warnings: [], assumed: [] }
}

export function rootSection(reader: Reader): Section {
  return { reader, data: asGroup(reader.yaml.data) ?? {}, path: [] }
}

/** The group under a key; an absent one reads as empty, so that its defaults apply. */
export function group(section: Section, key: string): Section {
  return { reader: section.reader, data: asGroup(own(section, key)) ?? {}, path: [...section.path, key] }
}

export function has(section: Section, key: string): boolean {
  return own(section, key) !== undefined
}

/** The groups in the list under a key. */
export function rows(section: Section, key: string): readonly Section[] {
  const list = own(section, key)
  if (!Array.isArray(list)) return []
  return list.flatMap((item, index) => {
    const data = asGroup(item)
    return data === null ? [] : [{ reader: section.reader, data, path: [...section.path, key, index] }]
  })
}

export function text(section: Section, key: string): string | null {
  const value = own(section, key)
  return typeof value === 'string' ? value : null
}

export function plainNumber(section: Section, key: string): number | null {
  const value = own(section, key)
  return typeof value === 'number' ? value : null
}

/** The texts in the list under a key, each with its path. */
export function texts(section: Section, key: string): readonly { readonly text: string; readonly path: Path }[] {
  const list = own(section, key)
  if (!Array.isArray(list)) return []
  return list.flatMap((item, index) =>
    typeof item === 'string' ? [{ text: item, path: [...section.path, key, index] }] : [],
  )
}

/** A quantity in SI, or null where the key is absent; a refusal is told and reads as null too. */
export function quantity(section: Section, key: string, kind: QuantityKindName, sign: QuantitySign): number | null {
  const value = own(section, key)
  if (typeof value !== 'string') return null
  const parsed = parseQuantity(value, { kind, sign })
  if (typeof parsed === 'number') {
    const unusual = unusualBecause(section.path, key, parsed)
    if (unusual !== null) {
      const complaint = {
        code: 'value-implausible',
        path: [...section.path, key],
        found: value,
        expected: unusual,
        hint: 'check the unit',
      } as const
      addWarning(section.reader, complaint)
    }
    return parsed
  }
  const { code, expected, hint } = parsed
  addProblem(section.reader, { code, path: [...section.path, key], found: value, expected, hint })
  return null
}

/**
 * A quantity that the schema requires. NaN stands for one that is missing or refused: its problem is told, and a
 * reading with problems has no value, so that NaN never leaves the reader.
 */
export function required(section: Section, key: string, kind: QuantityKindName, sign: QuantitySign): number {
  return quantity(section, key, kind, sign) ?? Number.NaN
}

/** A quantity with a default, which is listed as assumed. */
export function quantityOr(
  section: Section,
  key: string,
  kind: QuantityKindName,
  sign: QuantitySign,
  defaultText: string,
): number {
  if (has(section, key)) return required(section, key, kind, sign)
  return assume(section, key, kind, defaultText)
}

/** The default itself, listed as assumed. */
export function assume(section: Section, key: string, kind: QuantityKindName, defaultText: string): number {
  const value = parseQuantity(defaultText, { kind, sign: 'any' })
  if (typeof value !== 'number') throw new Error(`the default of ${key} is no quantity: ${defaultText}`)
  section.reader.assumed.push({ path: pathText([...section.path, key]), value: defaultText })
  return value
}

export interface Complaint {
  readonly code: ProblemCode
  readonly path: Path
  readonly found: string
  readonly expected: string
  readonly hint: string
}

export function addProblem(reader: Reader, complaint: Complaint, of: 'key' | 'value' = 'value'): void {
  reader.problems.push(placed(reader, complaint, of))
}

export function addWarning(reader: Reader, complaint: Complaint, of: 'key' | 'value' = 'value'): void {
  reader.warnings.push(placed(reader, complaint, of))
}

function placed(reader: Reader, { path, found, ...rest }: Complaint, of: 'key' | 'value'): Problem {
  return { ...rest, found: shown(found), file: reader.yaml.file, path: pathText(path), ...reader.yaml.place(path, of) }
}

function own({ data }: Section, key: string): unknown {
  return Object.hasOwn(data, key) ? (data[key] ?? undefined) : undefined
}

function asGroup(value: unknown): Readonly<Record<string, unknown>> | null {
  return typeof value === 'object' && value !== null && !Array.isArray(value)
    ? (value as Readonly<Record<string, unknown>>)
    : null
}

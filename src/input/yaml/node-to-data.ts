import { isAlias, isMap, isScalar, isSeq, type Node, type Scalar, type YAMLMap } from 'yaml'
import { shown } from '../../problems/shown.ts'
import { forbidden, type YamlFault } from './fault.ts'
import { type Path, pathText } from './path.ts'

/** Keys whose value is text whatever it looks like: an id may be 1N or 12. */
const textKeys: ReadonlySet<string> = new Set([
  'id',
  'title',
  'origin',
  'source',
  'mounting',
  'incumbent',
  'rectifier',
  'candidates',
  'records',
  'file',
  'reference',
])
const forbiddenKeys: ReadonlySet<string> = new Set(['__proto__', 'constructor', 'prototype', '<<'])

/** The nodes of a document as plain data, with every use of the language that is not taken here. */
export function nodeToData(root: Node): { readonly data: unknown; readonly faults: readonly YamlFault[] } {
  const faults: YamlFault[] = []
  return { data: convert(root, [], faults), faults }
}

function convert(node: unknown, path: Path, faults: YamlFault[]): unknown {
  refuseMarks(node, path, faults)
  if (isMap(node)) return convertMap(node, path, faults)
  if (isSeq(node)) return node.items.map((item, index) => convert(item, [...path, index], faults))
  return isScalar(node) ? convertScalar(node, path, faults) : null
}

function refuseMarks(node: unknown, path: Path, faults: YamlFault[]): void {
  const { range, anchor, tag } = (node ?? {}) as { range?: readonly number[]; anchor?: string; tag?: string }
  const at = range?.[0] ?? 0
  if (isAlias(node)) faults.push(forbidden(at, 'an alias', 'write the value out', pathText(path)))
  else if (anchor !== undefined) faults.push(forbidden(at, 'an anchor', 'leave the &name out', pathText(path)))
  else if (tag !== undefined) faults.push(forbidden(at, 'a tag', 'write plain text, numbers and lists', pathText(path)))
}

function convertMap(map: YAMLMap, path: Path, faults: YamlFault[]): Readonly<Record<string, unknown>> {
  const data: Record<string, unknown> = {}
  for (const { key, value } of map.items) {
    const name = isScalar(key) ? String(key.value) : ''
    const at = (key as Node | null)?.range?.[0] ?? map.range?.[0] ?? 0
    const inside = [...path, name]
    refuseMarks(key, inside, faults)
    if (forbiddenKeys.has(name)) {
      faults.push(forbidden(at, `the key "${name}"`, 'it is a name of the language itself', pathText(path)))
    } else if (Object.hasOwn(data, name)) {
      const found = shown(name)
      faults.push({ code: 'yaml-duplicate-key', offset: at, path: pathText(path), found, expected: '', hint: '' })
    } else {
      data[name] = convert(value, inside, faults)
    }
  }
  return data
}

function convertScalar(node: Scalar, path: Path, faults: YamlFault[]): unknown {
  const { value, source } = node
  if (typeof value === 'string' || value === null) return value
  const key = path.findLast((step) => typeof step === 'string')
  if (key !== undefined && textKeys.has(key as string)) return source ?? String(value)
  if (typeof value === 'number' && !Number.isFinite(value)) {
    const found = shown(source ?? String(value))
    const expected = 'a number that can be computed with'
    faults.push({
      code: 'number-not-finite',
      offset: node.range?.[0] ?? 0,
      path: pathText(path),
      found,
      expected,
      hint: '',
    })
    return 0
  }
  return value
}

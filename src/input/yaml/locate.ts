import { isMap, isScalar, isSeq, type Node, type Pair, type YAMLMap } from 'yaml'
import type { Path } from './path.ts'

/** Offset in the text of the value (or of its key) at a path; of the last step that exists when the path does not. */
export function locateIn(contents: Node | null, path: Path, of: 'key' | 'value'): number {
  let node: unknown = contents
  let offset = startOf(contents, 0)
  for (const [index, step] of path.entries()) {
    const pair = isMap(node) ? pairOf(node, String(step)) : undefined
    const child = isSeq(node) && typeof step === 'number' ? node.items[step] : pair?.value
    if (pair === undefined && child === undefined) return offset
    const keyOffset = pair === undefined ? startOf(child, offset) : startOf(pair.key, offset)
    const last = index === path.length - 1
    offset = last && of === 'value' ? startOf(child, keyOffset) : keyOffset
    node = child
  }
  return offset
}

/** Searching is faster than an index for the maps that people write; a hostile one has thousands of keys. */
const fewKeys = 40
const indexes = new WeakMap<YAMLMap, ReadonlyMap<string, Pair>>()

function pairOf(map: YAMLMap, key: string): Pair | undefined {
  if (map.items.length <= fewKeys) return map.items.find((pair) => nameOf(pair) === key)
  const known = indexes.get(map) ?? new Map(map.items.map((pair) => [nameOf(pair), pair]))
  indexes.set(map, known)
  return known.get(key)
}

function nameOf({ key }: Pair): string {
  return isScalar(key) ? String(key.value) : ''
}

function startOf(node: unknown, otherwise: number): number {
  return (node as Node | null | undefined)?.range?.[0] ?? otherwise
}

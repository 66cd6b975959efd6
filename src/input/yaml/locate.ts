import { isMap, isScalar, isSeq, type Node } from 'yaml'
import type { Path } from './path.ts'

/** Offset in the text of the value (or of its key) at a path; of the last step that exists when the path does not. */
export function locateIn(contents: Node | null, path: Path, of: 'key' | 'value'): number {
  let node: unknown = contents
  let offset = startOf(contents, 0)
  for (const [index, step] of path.entries()) {
    const pair = isMap(node)
      ? node.items.find(({ key }) => isScalar(key) && String(key.value) === String(step))
      : undefined
    const child = isSeq(node) && typeof step === 'number' ? node.items[step] : pair?.value
    if (pair === undefined && child === undefined) return offset
    const keyOffset = pair === undefined ? startOf(child, offset) : startOf(pair.key, offset)
    const last = index === path.length - 1
    offset = last && of === 'value' ? startOf(child, keyOffset) : keyOffset
    node = child
  }
  return offset
}

function startOf(node: unknown, otherwise: number): number {
  return (node as Node | null | undefined)?.range?.[0] ?? otherwise
}

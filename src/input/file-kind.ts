import type { Problem } from '../problems/problem.ts'

export type FileKind = 'stage' | 'records' | 'capture' | 'mapping'

interface KindWords {
  readonly name: string
  /** A key at its top that no other kind has. */
  readonly key: string | null
  /** Where such a file belongs. */
  readonly use: string
}

const kinds: Readonly<Record<FileKind, KindWords>> = {
  stage: { name: 'a stage file', key: 'stage', use: 'rank, trend, swap and review take it' },
  capture: { name: 'a file of capture settings', key: 'capture', use: 'reduce takes it' },
  mapping: { name: 'a mapping of columns', key: 'catalogue', use: '--mapping takes it' },
  records: { name: 'a file of rectifier records', key: null, use: 'name it in a stage file, or with --records' },
}

/** A file of another kind than the wanted one, told once in place of every key that does not fit; null otherwise. */
export function wrongKind(data: unknown, file: string, wanted: FileKind): readonly Problem[] | null {
  const kind = kindOf(data)
  const fits = wanted === 'records' ? isRecord(data) : hasKey(data, kinds[wanted].key)
  if (kind === null || kind === wanted || fits) return null
  return [problem(file, kinds[kind].name, wanted, kinds[kind].use)]
}

/** The same for a table, which is no YAML at all. */
export function tableInstead(file: string, wanted: FileKind): readonly Problem[] | null {
  if (!/\.(?:csv|tsv)$/i.test(file)) return null
  const use = wanted === 'capture' ? 'name it there under "file"' : '--records takes a table of parts, with --mapping'
  return [problem(file, 'a table', wanted, use)]
}

function problem(file: string, found: string, wanted: FileKind, hint: string): Problem {
  return { code: 'file-kind', file, line: 1, column: 1, path: '', found, expected: kinds[wanted].name, hint }
}

function kindOf(data: unknown): FileKind | null {
  if (Array.isArray(data)) return data.length > 0 && data.every(isRecord) ? 'records' : null
  const keyed = (['stage', 'capture', 'mapping'] as const).filter((kind) => hasKey(data, kinds[kind].key))
  if (keyed.length === 1) return keyed[0]!
  return keyed.length === 0 && isRecord(data) ? 'records' : null
}

function isRecord(data: unknown): boolean {
  return hasKey(data, 'id') && (hasKey(data, 'class') || hasKey(data, 'ratings'))
}

function hasKey(data: unknown, key: string | null): boolean {
  return key !== null && typeof data === 'object' && data !== null && !Array.isArray(data) && Object.hasOwn(data, key)
}

import { type Document, isMap, isScalar, isSeq, type ParsedNode, parseDocument, type YAMLMap } from 'yaml'

/** One row in the order in which its keys are written; values are texts with units. */
export type RowTexts = readonly (readonly [key: string, value: string])[]

/** Why a row is not appended. */
export type AppendRefusal =
  | { readonly refused: 'id-unknown'; readonly known: readonly string[] }
  | { readonly refused: 'there-already'; readonly line: number }

/**
 * Puts a row at the end of `recovery` of the record with an id. Everything else in the text stays byte for byte: comments,
 * order, spacing. Only where the record is written in braces the file is written anew by the YAML library, which keeps
 * comments and order. `mark` is a piece of text that a row of the same capture would hold.
 */
export function appendRecoveryRow(source: string, id: string, row: RowTexts, mark: string): string | AppendRefusal {
  const document = parseDocument(source, { keepSourceTokens: false, logLevel: 'silent' })
  const records = recordsIn(document)
  const record = records.find((map) => idOf(map) === id)
  if (record === undefined) return { refused: 'id-unknown', known: records.map(idOf) }
  const at = source.indexOf(mark, record.range![0])
  if (mark !== '' && at >= 0 && at < record.range![2])
    return { refused: 'there-already', line: source.slice(0, at).split('\n').length }
  const text = inserted(source, record, row)
  return text !== null && holdsExactly(text, document, id, row) ? text : rewritten(document, record, row)
}

function idOf(record: YAMLMap.Parsed): string {
  return String(record.get('id') as unknown)
}

/** The new text says what the old one said, and the row. */
function holdsExactly(text: string, before: Document.Parsed<ParsedNode>, id: string, row: RowTexts): boolean {
  const after = parseDocument(text, { logLevel: 'silent' })
  if (after.errors.length > 0) return false
  const wanted = before.toJS() as Plain | readonly Plain[]
  const record = [wanted].flat().find((one) => one.id === id)!
  record.recovery = [...((record.recovery as readonly unknown[] | null | undefined) ?? []), Object.fromEntries(row)]
  return JSON.stringify(after.toJS()) === JSON.stringify(wanted)
}

type Plain = Record<string, unknown>

function recordsIn(document: Document.Parsed<ParsedNode>): readonly YAMLMap.Parsed[] {
  const { contents } = document
  if (isMap(contents)) return [contents as YAMLMap.Parsed]
  return isSeq(contents) ? (contents.items.filter((item) => isMap(item)) as YAMLMap.Parsed[]) : []
}

/** The row as a new line of the text; null where record or list are written in braces or brackets. */
function inserted(source: string, record: YAMLMap.Parsed, row: RowTexts): string | null {
  if (record.flow === true || record.items.length === 0) return null
  const newline = source.includes('\r\n') ? '\r\n' : '\n'
  const pair = record.items.find(({ key }) => isScalar(key) && key.value === 'recovery')
  if (pair === undefined) {
    const indent = columnOf(source, record.items[0]!.key!.range[0])
    return withLines(
      source,
      endOf(source, record.items.at(-1)!),
      [`${indent}recovery:`, `${indent}  - ${flowText(row)}`],
      newline,
    )
  }
  const list = pair.value
  if (!isSeq(list) || list.flow === true || list.items.length === 0) return null
  const last = list.items.at(-1)!
  const dash = source.lastIndexOf('-', (last.range as readonly number[])[0]! - 1)
  return withLines(
    source,
    (last.range as readonly number[])[1]!,
    [`${columnOf(source, dash)}- ${flowText(row)}`],
    newline,
  )
}

/** Spaces up to the column of an offset. */
function columnOf(source: string, offset: number): string {
  return ' '.repeat(offset - (source.lastIndexOf('\n', offset - 1) + 1))
}

function endOf(source: string, pair: YAMLMap.Parsed['items'][number]): number {
  const range = (pair.value as { readonly range?: readonly number[] } | null)?.range ?? pair.key!.range
  return Math.min(source.length, range![1]!)
}

/** New lines after the line in which an offset lies, so that a comment at its end stays where it is. */
function withLines(source: string, offset: number, lines: readonly string[], newline: string): string {
  // the end of a block lies behind its last line break
  const inside = source[offset - 1] === '\n' ? offset - 1 : offset
  const end = source.indexOf('\n', inside)
  const cut = end < 0 ? source.length : end + 1
  const before = source.slice(0, cut)
  const gap = end < 0 ? newline : ''
  return `${before}${gap}${lines.join(newline)}${newline}${source.slice(cut)}`
}

function flowText(row: RowTexts): string {
  return `{${row.map(([key, value]) => `${key}: ${plain.test(value) ? value : JSON.stringify(value)}`).join(', ')}}`
}

/** What needs no quotes inside braces. */
const plain = /^[A-Za-z0-9.+-][A-Za-z0-9.+\-/% ]*$/

function rewritten(document: Document.Parsed<ParsedNode>, record: YAMLMap.Parsed, row: RowTexts): string {
  const node = document.createNode(Object.fromEntries(row), { flow: true })
  const list = record.get('recovery', true) as unknown
  const comment = isScalar(list) ? list.comment : null
  if (isSeq(list)) list.items.push(node)
  else {
    const opened = document.createNode([node])
    if (comment != null) opened.commentBefore = comment
    record.set('recovery' as never, opened as never)
  }
  return document.toString({ lineWidth: 0, flowCollectionPadding: false })
}

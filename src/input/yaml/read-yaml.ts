import { Composer, type Document, LineCounter, type ParsedNode, Parser } from 'yaml'
import type { Problem } from '../../problems/problem.ts'
import { shown } from '../../problems/shown.ts'
import { checkText } from './check-text.ts'
import { forbidden, type YamlFault } from './fault.ts'
import { locateIn } from './locate.ts'
import { isNestedTooDeep, lineNestedTooDeep, mostLevels } from './nesting.ts'
import { nodeToData } from './node-to-data.ts'
import type { Path } from './path.ts'

/** 1-based. */
export interface Place {
  readonly line: number
  readonly column: number
}

/** A YAML file as plain data, and the way back from a path in the data to the place in the text. */
export interface YamlFile {
  readonly file: string
  readonly data: unknown
  /** Place of a value, or of its key; of the nearest enclosing thing when there is no such path. */
  readonly place: (path: Path, of: 'key' | 'value') => Place
}

/** The file is null when its text cannot be understood at all; the problems then say why. */
export interface YamlReading {
  readonly yaml: YamlFile | null
  readonly problems: readonly Problem[]
}

/**
 * Reads one YAML 1.2 document. Aliases, anchors, tags, directives, several documents, keys that are no text,
 * keys twice and names of object internals are refused; nesting is bounded. Never throws on any text.
 */
export function readYaml(text: string, file: string, wanted: string): YamlReading {
  const notText = checkText(text, file)
  if (notText !== null) return { yaml: null, problems: [notText] }
  const deep = lineNestedTooDeep(text)
  if (deep !== null) return { yaml: null, problems: [{ ...levels, file, line: deep, column: 1 }] }
  const lines = new LineCounter()
  const placeOf = (offset: number): Place => {
    const { line, col } = lines.linePos(offset)
    return { line: Math.max(1, line), column: Math.max(1, col) }
  }
  const tell = ({ offset, ...fault }: YamlFault): Problem => ({ ...fault, file, ...placeOf(offset) })

  const composed = compose(text, lines)
  if ('fault' in composed) return { yaml: null, problems: [tell(composed.fault)] }
  const documents = composed.documents
  const document = documents[0]
  if (document === undefined || document.contents === null || isEmpty(document)) {
    const empty: YamlFault = { code: 'file-empty', offset: 0, path: '', found: '', expected: wanted, hint: '' }
    return { yaml: null, problems: [...syntaxFaults(documents), empty].slice(0, 1).map(tell) }
  }
  const syntax = syntaxFaults(documents)
  if (syntax.length > 0) return { yaml: null, problems: syntax.map(tell) }
  const { data, faults } = nodeToData(document.contents)
  const place = (path: Path, of: 'key' | 'value') => placeOf(locateIn(document.contents, path, of))
  return { yaml: { file, data, place }, problems: [...directiveFaults(text, document), ...faults].map(tell) }
}

const options = {
  version: '1.2',
  schema: 'core',
  strict: true,
  stringKeys: true,
  // Checked in nodeToData: the package compares every key with every other.
  uniqueKeys: false,
  prettyErrors: false,
  logLevel: 'silent',
} as const

type Composed = { readonly documents: readonly Document.Parsed<ParsedNode>[] } | { readonly fault: YamlFault }

/** Composing is recursive, reading tokens is not: depth is looked at between the two, before the stack can run out. */
function compose(text: string, lines: LineCounter): Composed {
  const parser = new Parser(lines.addNewLine)
  const composer = new Composer<ParsedNode>(options)
  const documents: Document.Parsed<ParsedNode>[] = []
  try {
    for (const token of parser.parse(text)) {
      const deep = isNestedTooDeep(token)
      if (deep !== null) return { fault: tooDeep(deep) }
      for (const document of composer.next(token)) documents.push(document)
    }
  } catch (error) {
    // The package closes many open levels at once by calling itself; composing cannot come here with its few levels.
    if (error instanceof RangeError) return { fault: tooDeep(lines.lineStarts.at(-1) ?? 0) }
    throw error
  }
  for (const document of composer.end(true, text.length)) documents.push(document)
  return { documents }
}

const levels = { code: 'yaml-too-deep', path: '', found: '', expected: `${mostLevels} levels`, hint: '' } as const

function tooDeep(offset: number): YamlFault {
  return { ...levels, offset }
}

function isEmpty(document: Document.Parsed<ParsedNode>): boolean {
  const contents = document.contents as { readonly value?: unknown; readonly source?: string }
  return contents.value === null && (contents.source ?? '') === ''
}

/** One slip often breaks everything after it, so only the first few are told. */
const mostSyntaxFaults = 5

function syntaxFaults(documents: readonly Document.Parsed<ParsedNode>[]): readonly YamlFault[] {
  const [first, second] = documents
  const errors = first === undefined ? [] : [...first.errors, ...first.warnings]
  const runOn = new Set(errors.filter(({ code }) => code === 'MULTILINE_IMPLICIT_KEY').map(({ pos }) => pos[0]))
  const faults = firstAtEachPlace(errors).map((error): YamlFault => {
    const indented = error.code === 'BLOCK_AS_IMPLICIT_KEY' && runOn.has(error.pos[0])
    const [expected, hint] = indented ? indentedWords : (syntaxWords[error.code] ?? [lowerFirst(error.message), ''])
    if (error.code === 'TAG_RESOLVE_FAILED')
      return forbidden(error.pos[0], 'a tag', 'write plain text, numbers and lists')
    if (error.code === 'BAD_DIRECTIVE')
      return forbidden(error.pos[0], 'a directive', 'leave lines that begin with % out')
    return { code: 'yaml-syntax', offset: error.pos[0], path: '', found: '', expected, hint }
  })
  if (second !== undefined && second.range !== undefined) {
    faults.push(forbidden(second.range[0], 'a second document', 'keep one document in a file, records as a list'))
  }
  return faults.slice(0, mostSyntaxFaults)
}

/** The package tells one slip under several codes. */
function firstAtEachPlace<Fault extends { readonly pos: readonly number[] }>(
  faults: readonly Fault[],
): readonly Fault[] {
  const told = new Set<number | undefined>()
  return faults.filter(({ pos: [at] }) => !told.has(at) && told.add(at))
}

/** A value that runs on into the next line and finds a key there. */
const indentedWords: readonly [string, string] = [
  'the line below is indented too far: a value stands here already',
  'begin both keys in one column',
]

/** In our own words, by the code of the package; what is not listed keeps the package's sentence. */
const syntaxWords: Readonly<Record<string, readonly [string, string]>> = {
  TAB_AS_INDENT: ['a tab stands where only spaces may indent', 'use spaces'],
  BAD_INDENT: ['the indentation does not fit what stands above, or a bracket is not closed', ''],
  BLOCK_AS_IMPLICIT_KEY: ['a second ": " stands in this line', 'put text that contains ": " in quotes'],
  MISSING_CHAR: ['a sign is missing here, such as a comma, a colon with a space, or a closing quote or bracket', ''],
  MULTILINE_IMPLICIT_KEY: ['a key must stand in one line, followed by a colon and a space', ''],
  NON_STRING_KEY: ['a key must be plain text', ''],
  UNEXPECTED_TOKEN: ['something stands here that does not belong', 'put text with special signs in quotes'],
  BAD_DQ_ESCAPE: ['a backslash is followed by a sign that has no meaning', 'double it or use single quotes'],
}

function lowerFirst(message: string): string {
  return shown(message.slice(0, 1).toLowerCase() + message.slice(1))
}

function directiveFaults(text: string, document: Document.Parsed<ParsedNode>): readonly YamlFault[] {
  const tags = document.directives?.tags ?? {}
  const explicit = document.directives?.yaml.explicit === true || Object.keys(tags).some((tag) => tag !== '!!')
  if (!explicit) return []
  const at = text.search(/^%/m)
  return [forbidden(Math.max(0, at), 'a directive', 'leave lines that begin with % out')]
}

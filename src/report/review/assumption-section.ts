import type { CandidateResult, Provenance } from '../../domain/result.ts'
import type { LedgerEntry, ReviewResult } from '../../domain/review.ts'
import { absent, significant } from '../format.ts'
import { type ColumnSpec, tableOf, textColumn } from '../table-view.ts'
import { figureWords, howWords } from '../words/review-words.ts'
import { inputText, resultText } from './exact-value.ts'
import { figureEquations } from './figure-equations.ts'
import { type ReviewBlock, type ReviewSection, tableBlock } from './review-types.ts'

export function assumptionSection(review: ReviewResult): ReviewSection {
  return {
    title: 'Assumption ledger',
    blocks: [
      {
        kind: 'text',
        text: 'First how each figure is computed, then where the figures of each part were read and how far they were moved, then every input.',
      },
      figureEquations,
      conversionTable(review),
      ...ledgerTables(review.ledger),
    ],
  }
}

/** Figures of one part that were read at the same place in the same way. */
interface Conversion {
  readonly part: CandidateResult
  readonly origin: Provenance
  readonly figures: readonly Provenance[]
  readonly entry: LedgerEntry | undefined
}

function conversionsOf(part: CandidateResult, ledger: readonly LedgerEntry[]): Conversion[] {
  const groups = new Map<string, Provenance[]>()
  for (const each of part.provenance) {
    const key = JSON.stringify([each.how, each.from])
    groups.set(key, [...(groups.get(key) ?? []), each])
  }
  return [...groups.values()].map((figures) => {
    const origin = figures[0]!
    return {
      part,
      origin,
      figures,
      entry: ledger.find(
        ({ subject, path }) =>
          subject === part.id && (path.startsWith(`${origin.from}:`) || path.startsWith(`${origin.from}.`)),
      ),
    }
  })
}

function conversionTable({ rank, ledger }: ReviewResult): ReviewBlock {
  const rows = rank.candidates.flatMap((part) => conversionsOf(part, ledger))
  if (rows.length === 0) return { kind: 'text', text: 'No candidate has figures to convert.' }
  const columns: readonly ColumnSpec<Conversion>[] = [
    textColumn('part', 'key', ({ part }) => part.id, true),
    textColumn('figures, × factor', 'v', ({ part, figures }) =>
      figures.map((each) => figureText(part, each)).join('; '),
    ),
    textColumn('how', 'v', ({ origin }) => howWords[origin.how]),
    textColumn('from', 'v', ({ origin }) => origin.from),
    textColumn('grade', 'v', ({ entry }) => entry?.grade ?? null),
    textColumn('place', 'v', ({ entry }) => entry?.place || null),
    textColumn('source', 'v', ({ entry }) => entry?.source ?? null),
  ]
  return tableBlock('Where the figures of each part come from', tableOf(columns, rows), {
    long: true,
    note: 'The factor is the figure at the operating point over that of the row. Converted: within 1.5 times of the rows in current and slope and 25 K in temperature; extrapolated: beyond. Class guess: the record says nothing, and the class priors at the end of this section stand in.',
  })
}

function figureText(part: CandidateResult, { figure, factor }: Provenance): string {
  const moved = factor === null ? '' : ` × ${significant(factor)}`
  return `${figureWords[figure] ?? figure} ${printedValue(part, figure)}${moved}`
}

const readers: Readonly<Record<string, (part: CandidateResult) => string>> = {
  'event.qrr_c': ({ event }) => resultText(event?.qrr_c ?? null, 'C'),
  'event.peak_reverse_a': ({ event }) => resultText(event?.peak_reverse_a ?? null, 'A'),
  'event.trr_s': ({ event }) => resultText(event?.trr_s ?? null, 's'),
  forward_v: ({ forward_v }) => resultText(forward_v, 'V'),
  'losses_w.leakage': ({ losses_w }) => resultText(losses_w.leakage, 'W'),
  'losses_w.capacitive': ({ losses_w }) => resultText(losses_w.capacitive, 'W'),
}

function printedValue(part: CandidateResult, figure: string): string {
  return readers[figure]?.(part) ?? absent
}

/** Inputs of the stage, then of each record, then of the classes, a table each. */
function ledgerTables(ledger: readonly LedgerEntry[]): ReviewBlock[] {
  const subjects = [...new Set(ledger.map(({ subject }) => subject))]
  return subjects.map((subject) => {
    const own = ledger.filter((entry) => entry.subject === subject)
    const rows = subject.startsWith('class ') ? own : joined(own)
    const stage = subject === 'stage'
    return tableBlock(stage ? 'Inputs of the stage' : `Inputs of ${subject}`, tableOf(ledgerColumns(rows), rows), {
      long: true,
      note: stage
        ? 'Given: in the stage file. Default: not in it, so the tool’s own value stands in. Not given, taken as 0 or 1: left out, or stated as just that; nothing is counted for it.'
        : null,
    })
  })
}

/** Figures of one row or one group stand in one line where they share origin, grade, source and place. */
function joined(entries: readonly LedgerEntry[]): readonly LedgerEntry[] {
  const lines = new Map<string, LedgerEntry>()
  for (const entry of entries) {
    const { origin, grade, source, place } = entry
    const [name, figure] = splitPath(entry.path)
    const key = JSON.stringify([name, origin, grade, source, place])
    const before = lines.get(key)
    const text = `${figure === '' ? '' : `${figure} `}${inputText(entry.value, entry.unit)}`
    const value = before === undefined ? text : `${before.value}, ${text}`
    lines.set(key, { ...entry, path: name, value, unit: '' })
  }
  return [...lines.values()]
}

/** "recovery row 1: qrr" and "ratings.junction" in group and figure; a path of one word is its own group. */
function splitPath(path: string): readonly [string, string] {
  const at = path.search(/[.:]/)
  return at < 0 ? [path, ''] : [path.slice(0, at), path.slice(at + 1).trim()]
}

function ledgerColumns(rows: readonly LedgerEntry[]): readonly ColumnSpec<LedgerEntry>[] {
  const some = (read: (row: LedgerEntry) => string | null) => rows.some((row) => (read(row) ?? '') !== '')
  const optional: readonly (readonly [string, (row: LedgerEntry) => string | null])[] = [
    ['grade', ({ grade }) => grade],
    ['source', ({ source }) => source],
    ['place', ({ place }) => place || null],
  ]
  return [
    textColumn('input', 'key', ({ path }) => path, true),
    textColumn('value', 'v', ({ value, unit }) => inputText(value, unit)),
    textColumn('origin', 'v', ({ origin }) => origin),
    ...optional.filter(([, read]) => some(read)).map(([title, read]) => textColumn(title, 'v', read)),
  ]
}

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

interface Conversion extends Provenance {
  readonly part: CandidateResult
  readonly entry: LedgerEntry | undefined
}

function conversionTable({ rank, ledger }: ReviewResult): ReviewBlock {
  const rows: Conversion[] = rank.candidates.flatMap((part) =>
    part.provenance.map((each) => ({
      ...each,
      part,
      entry: ledger.find(({ subject, path }) => subject === part.id && path.startsWith(`${each.from}:`)),
    })),
  )
  if (rows.length === 0) return { kind: 'text', text: 'No candidate has figures to convert.' }
  const columns: readonly ColumnSpec<Conversion>[] = [
    textColumn('part', 'key', ({ part }) => part.id, true),
    textColumn('figure', 'key', ({ figure }) => figureWords[figure] ?? figure),
    textColumn('value', 'v', ({ part, figure }) => printedValue(part, figure)),
    textColumn('how', 'v', ({ how }) => howWords[how]),
    textColumn('factor', 'v', ({ factor }) => (factor === null ? null : `× ${significant(factor)}`)),
    textColumn('from', 'v', ({ from }) => from),
    textColumn('grade', 'v', ({ entry, how }) => entry?.grade ?? (how === 'class-guess' ? 'class guess' : null)),
    textColumn('place', 'v', ({ entry }) => entry?.place || null),
    textColumn('source', 'v', ({ entry }) => entry?.source ?? null),
  ]
  return tableBlock('Where the figures of each part come from', tableOf(columns, rows), {
    long: true,
    note: 'The factor is the figure at the operating point over that of the row. Converted: within 1.5 times of the rows in current and slope and 25 K in temperature; extrapolated: beyond. Class guess: the record says nothing.',
  })
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
    const rows = ledger.filter((entry) => entry.subject === subject)
    const heading = subject === 'stage' ? 'Inputs of the stage' : `Inputs of ${subject}`
    return tableBlock(heading, tableOf(ledgerColumns(rows), rows), { long: true })
  })
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

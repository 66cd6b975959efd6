import type { ConventionFigure, ReviewMethod, ReviewResult } from '../../domain/review.ts'
import { significant } from '../format.ts'
import { numberColumn, tableOf, textColumn } from '../table-view.ts'
import { type ReviewBlock, type ReviewSection, tableBlock } from './review-types.ts'

export function equationsSection({ methods, conventions }: ReviewResult): ReviewSection {
  return {
    title: 'Event model, equations and other conventions',
    blocks: [
      {
        kind: 'text',
        text: 'The event: current I falls at a; at zero the junction still holds charge, so the current runs on to −I_RM over ta; then the junction blocks, the current dies with tau_rr and the voltage of the switch falls over t_fv. E_rectifier heats the rectifier, E_switch_added and E_base heat the switch; E_rectifier + E_switch_added = V (Qrr + I ta) exactly, whatever t_fv.',
      },
      { kind: 'methods', items: methods.map(methodItem) },
      ...(conventions.length === 0
        ? [
            {
              kind: 'text',
              text: 'No shown part recovers hard, so there is no event to set beside other conventions.',
            } as const,
          ]
        : conventionTables(conventions)),
    ],
  }
}

function methodItem({ id, equation, source, bias, validity }: ReviewMethod) {
  const ranges = validity.map(({ input, low, high, unit }) => {
    const side = (value: number) => `${significant(value)}${unit === '1' ? '' : ` ${unit}`}`
    if (low !== null && high !== null) return `${input} ${significant(low)} to ${side(high)}`
    if (low !== null) return `${input} from ${side(low)}`
    return high === null ? input : `${input} up to ${side(high)}`
  })
  const range = ranges.length === 0 ? '' : `Valid for ${ranges.join('; ')}. `
  return { name: id, equation, source, note: `${range}Known bias: ${bias}.` }
}

function conventionTables(conventions: readonly ConventionFigure[]): ReviewBlock[] {
  const ids = [...new Set(conventions.map(({ id }) => id))]
  return ids.map((id) =>
    tableBlock(
      `One event of ${id} by other conventions`,
      tableOf(
        [
          textColumn('convention', 'key', ({ name }: ConventionFigure) => name, true),
          textColumn('heats', 'c', ({ heats }: ConventionFigure) => heats),
          numberColumn('energy', 'µJ', 'c', ({ energy_j }: ConventionFigure) => energy_j, { scale: 1e6 }),
          numberColumn('at the frequency', 'W', 'c', ({ power_w }: ConventionFigure) => power_w),
          textColumn('source', 'c', ({ source }: ConventionFigure) => source),
        ],
        conventions.filter((each) => each.id === id),
      ),
      {
        note: 'They differ because they place the voltage differently and heat different parts; none of the others is used for a result.',
      },
    ),
  )
}

export function openSection({ rank }: ReviewResult): ReviewSection {
  return {
    title: 'Not covered, and open points',
    blocks: [
      {
        kind: 'list',
        heading: 'Not covered',
        tone: 'plain',
        items: rank.not_covered.map((text) => ({ lead: null, text })),
      },
      openPoints(rank.warnings),
    ],
  }
}

/** One item per sentence and code, naming every part it holds for. */
function openPoints(warnings: ReviewResult['rank']['warnings']): ReviewBlock {
  const grouped = new Map<string, { code: string; text: string; parts: string[] }>()
  for (const { code, candidate, text } of warnings) {
    const key = JSON.stringify([code, text])
    const entry = grouped.get(key) ?? { code, text, parts: [] }
    if (candidate !== '' && !entry.parts.includes(candidate)) entry.parts.push(candidate)
    grouped.set(key, entry)
  }
  const items = [...grouped.values()].map(({ code, text, parts }) => ({
    lead: parts.length === 0 ? code : `${code} (${parts.join(', ')})`,
    text,
  }))
  return items.length === 0
    ? { kind: 'text', text: 'No warning stands open.' }
    : { kind: 'list', heading: 'Open points', tone: 'warning', items }
}

export function identitySection({ rank }: ReviewResult): ReviewSection {
  const { tool, seed, draws, inputs, format } = rank
  return {
    title: 'Version, seed and input files',
    blocks: [
      {
        kind: 'facts',
        items: [
          { label: 'Tool', text: `${tool.name} ${tool.version}` },
          { label: 'Seed and draws', text: `${seed}, ${draws}` },
          { label: 'Result format', text: String(format) },
          {
            label: 'Repeatable',
            text: 'The same input files, seed, draws and version give this document again, byte for byte.',
          },
        ],
      },
      tableBlock(
        'Input files, by path from the stage file',
        tableOf(
          [
            textColumn('file', 'key', ({ path }: (typeof inputs)[number]) => path, true),
            textColumn('sha256', 'hash', ({ sha256 }: (typeof inputs)[number]) => sha256),
          ],
          inputs,
        ),
      ),
    ],
  }
}

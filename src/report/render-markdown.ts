import type { AnyResult } from '../domain/study.ts'
import { groupTables, plainTitle } from './table-view.ts'
import { viewOf } from './view.ts'
import type { Block, Column, Table } from './view-types.ts'

/** A worded result as Markdown with complete tables. */
export function renderMarkdown(result: AnyResult): string {
  const { title, blocks } = viewOf(result)
  return `${[`# ${escapeMarkdown(title)}`, ...blocks.flatMap(blockParts)].join('\n\n')}\n`
}

function blockParts(block: Block): string[] {
  switch (block.kind) {
    case 'facts':
      return [
        block.items.map(({ label, text }) => `- **${escapeMarkdown(label)}:** ${escapeMarkdown(text)}`).join('\n'),
      ]
    case 'chart':
      return []
    case 'text':
      return [...headingParts(block.heading), escapeMarkdown(block.text)]
    case 'list':
      return [...headingParts(block.heading), block.items.map(listLine).join('\n')]
    case 'table':
      return [
        ...headingParts(block.heading),
        ...groupTables(block.table).flatMap(({ group, table }) => [
          ...(group === block.heading ? [] : [`### ${escapeMarkdown(group)}`]),
          markdownTable(table),
        ]),
        ...(block.note === null ? [] : [escapeMarkdown(block.note)]),
      ]
  }
}

function headingParts(heading: string | null): string[] {
  return heading === null ? [] : [`## ${escapeMarkdown(heading)}`]
}

function listLine({ lead, text }: { readonly lead: string | null; readonly text: string }): string {
  return lead === null ? `- ${escapeMarkdown(text)}` : `- **${escapeMarkdown(lead)}:** ${escapeMarkdown(text)}`
}

export function markdownTable({ columns, rows }: Table): string {
  const line = (cells: readonly string[]) => `| ${cells.join(' | ')} |`
  return [
    line(columns.map(headerText)),
    line(columns.map(({ numeric }) => (numeric ? '---:' : '---'))),
    ...rows.map((row) => line(row.map(({ text }) => escapeMarkdown(text)))),
  ].join('\n')
}

function headerText({ title, unit }: Column): string {
  const name = title === '#' ? 'rank' : plainTitle(title)
  return escapeMarkdown(unit === null ? name : `${name} (${unit})`)
}

/** Text that no Markdown reader takes for markup, HTML, a link or a cell border. */
export function escapeMarkdown(text: string): string {
  return text
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replace(/[\\`*_[\]|~$]/g, '\\$&')
    .replace(/:\/\//g, ':&#47;&#47;')
    .replace(/^(\s*)([#+=-])/, '$1\\$2')
    .replace(/^(\s*\d+)([.)])(?=\s|$)/, '$1\\$2')
}

import { escapeText } from '../charts/svg.ts'
import type { Cell, Column } from '../view-types.ts'
import { compactDrawing } from './compact-drawing.ts'
import type { ReviewBlock, TableBlock } from './review-types.ts'

/** One block as HTML. All text is escaped; drawings are markup already. */
export function blockMarkup(block: ReviewBlock): string {
  switch (block.kind) {
    case 'text':
      return `<p${block.lead ? ' class="lead"' : ''}>${prose(block.text)}</p>`
    case 'facts':
      return `<dl>${block.items.map(({ label, text }) => `<dt>${escapeText(label)}</dt><dd>${prose(text)}</dd>`).join('')}</dl>`
    case 'list':
      return `${block.heading === null ? '' : `<h3>${escapeText(block.heading)}</h3>`}<ul class="${block.tone}">${block.items.map(itemMarkup).join('')}</ul>`
    case 'table':
      return tableMarkup(block)
    case 'figure':
      return `<figure><div class="drawing" tabindex="0" role="group" aria-label="${escapeText(block.caption)}">${compactDrawing(block.svg)}</div><figcaption>${escapeText(block.caption)}</figcaption></figure>`
    case 'methods':
      return `<ul class="methods">${block.items
        .map(
          ({ name, equation, source, note }) =>
            `<li><strong>${escapeText(name)}</strong><span class="equation">${escapeText(equation)}</span>${escapeText(note)} <span class="quiet">Source: ${escapeText(source)}.</span></li>`,
        )
        .join('')}</ul>`
  }
}

/** Mentions of a section become links to it; a number and its unit stay on one line. */
function prose(text: string): string {
  const held = escapeText(text).replace(
    /(\d) (?=(?:°C|%|[kMmµnp]?(?:W|V|A|Hz|F|C|J|s|Ω|K|H))(?![\p{L}\d]))/gu,
    '$1\u00A0',
  )
  return held.replace(/\bsection (\d{1,2})\b/g, '<a href="#section-$1">section $1</a>')
}

function itemMarkup({ lead, text }: { readonly lead: string | null; readonly text: string }): string {
  return `<li>${lead === null ? '' : `<strong>${escapeText(lead)}:</strong> `}${prose(text)}</li>`
}

/** A table in a box of its own that scrolls and can be focused; its first text column names the row. */
function tableMarkup({ heading, table, note, exact = false, long = false }: TableBlock): string {
  const { columns, rows } = table
  const naming = Math.max(
    0,
    columns.findIndex(({ key, numeric }) => key && !numeric),
  )
  const spoken = columns.every(({ numeric }) => !numeric)
  const heads = columns
    .map((column) => `<th scope="col"${textClass(column)}>${escapeText(headText(column))}</th>`)
    .join('')
  const body = rows.map(
    (row) =>
      `<tr>${row.map((cell, index) => cellMarkup(cell, columns[index]!, index === naming, exact, spoken)).join('')}</tr>`,
  )
  return (
    `<div class="scroll${long ? ' long' : ''}" tabindex="0" role="group" aria-label="${escapeText(heading)}"><table${spoken ? ' class="words"' : ''}><caption>${escapeText(heading)}</caption>` +
    `<thead><tr>${heads}</tr></thead>\n<tbody>${body.join('\n')}</tbody></table></div>` +
    (note === null ? '' : `<p class="note">${prose(note)}</p>`)
  )
}

function cellMarkup({ text, value }: Cell, column: Column, naming: boolean, exact: boolean, spoken: boolean): string {
  const shown = escapeText(text)
  if (naming) return `<th scope="row">${shown}</th>`
  const whole = exact && column.numeric && typeof value === 'number' ? ` data-value="${value}"` : ''
  return `<td${whole}${spoken ? '' : textClass(column)}>${shown}</td>`
}

/** Numbers are what most cells hold, so texts are the ones that are marked. */
function textClass({ numeric }: Column): string {
  return numeric ? '' : ' class="t"'
}

function headText({ title, unit }: Column): string {
  const plain = title.replaceAll('\u00AD', '')
  return unit === null ? plain : `${plain} (${unit})`
}

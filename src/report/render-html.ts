import type { AnyResult } from '../domain/study.ts'
import { renderChart } from './charts/render-chart.ts'
import { escapeText } from './charts/svg.ts'
import { groupTables, plainTitle } from './table-view.ts'
import { viewOf } from './view.ts'
import type { Block, Column, Table } from './view-types.ts'

/** A worded result as one HTML page without scripts or outside references: the same tables, and the chart. */
export function renderHtml(result: AnyResult): string {
  const { title, blocks } = viewOf(result)
  const chart = `<figure tabindex="0">${renderChart(result).trim()}</figure>`
  const marked = blocks.some(({ kind }) => kind === 'chart')
  const body = blocks.map((block, index) => (!marked && index === 1 ? chart : '') + blockMarkup(block, chart))
  return [
    '<!DOCTYPE html>',
    '<html lang="en">',
    '<head>',
    '<meta charset="utf-8">',
    `<meta http-equiv="Content-Security-Policy" content="default-src 'none'; style-src 'unsafe-inline'; base-uri 'none'; form-action 'none'">`,
    '<meta name="viewport" content="width=device-width, initial-scale=1">',
    `<title>${escapeText(title)}</title>`,
    `<style>${style}</style>`,
    '</head>',
    '<body>',
    '<main>',
    `<h1>${escapeText(title)}</h1>`,
    ...body,
    '</main>',
    '</body>',
    '</html>',
    '',
  ].join('\n')
}

function blockMarkup(block: Block, chart: string): string {
  switch (block.kind) {
    case 'facts':
      return `<dl>${block.items.map(({ label, text }) => `<dt>${escapeText(label)}</dt><dd>${escapeText(text)}</dd>`).join('')}</dl>`
    case 'chart':
      return chart
    case 'text':
      return `${headingMarkup(block.heading)}<p>${escapeText(block.text)}</p>`
    case 'list':
      return `<section class="${block.tone}">${headingMarkup(block.heading)}<ul>${block.items.map(itemMarkup).join('')}</ul></section>`
    case 'table':
      return [
        headingMarkup(block.heading),
        ...groupTables(block.table).map(({ group, table }) => tableMarkup(table, group, group !== block.heading)),
        block.note === null ? '' : `<p>${escapeText(block.note)}</p>`,
      ].join('\n')
  }
}

function headingMarkup(heading: string | null): string {
  return heading === null ? '' : `<h2>${escapeText(heading)}</h2>`
}

function itemMarkup({ lead, text }: { readonly lead: string | null; readonly text: string }): string {
  return `<li>${lead === null ? '' : `<strong>${escapeText(lead)}:</strong> `}${escapeText(text)}</li>`
}

/** A table, under its caption unless a heading says the same; it scrolls by itself where the page is narrow. */
function tableMarkup({ columns, rows }: Table, caption: string, captioned: boolean): string {
  const heads = columns
    .map((column) => `<th scope="col"${numeric(column)}>${escapeText(headerText(column))}</th>`)
    .join('')
  const cells = (row: Table['rows'][number]) =>
    row.map(({ text }, index) => `<td${numeric(columns[index]!)}>${escapeText(text)}</td>`).join('')
  const body = rows.map((row) => `<tr>${cells(row)}</tr>`).join('\n')
  return (
    `<div class="scroll" tabindex="0" role="region" aria-label="${escapeText(caption)}"><table>${captioned ? `<caption>${escapeText(caption)}</caption>` : ''}` +
    `<thead><tr>${heads}</tr></thead>\n<tbody>${body}</tbody></table></div>`
  )
}

function numeric(column: Column): string {
  return column.numeric ? ' class="number"' : ''
}

function headerText({ title, unit }: Column): string {
  const name = title === '#' ? 'rank' : plainTitle(title)
  return unit === null ? name : `${name} (${unit})`
}

const style = `
:root{color-scheme:light dark;--ink:#222;--paper:#fff;--rule:#bbb;--quiet:#595959;--warn:#7a4a00;--alert:#a1260d}
@media(prefers-color-scheme:dark){:root{--ink:#e6e6e6;--paper:#16191c;--rule:#565b60;--quiet:#b4b4b4;--warn:#f0b95a;--alert:#ff9c86}}
body{margin:0;background:var(--paper);color:var(--ink);font:16px/1.5 Georgia,"Times New Roman",serif}
main{max-width:76rem;margin:0 auto;padding:1.5rem}
h1{font-size:1.5rem;line-height:1.25}h2{font-size:1.15rem;margin:1.8rem 0 .4rem}
dl{display:grid;grid-template-columns:max-content 1fr;gap:.2rem 1rem}dt{color:var(--quiet)}dd{margin:0;min-width:0;overflow-wrap:anywhere}
p,li{max-width:48rem;overflow-wrap:anywhere}
.scroll{overflow-x:auto;margin:.6rem 0 1rem}
table{border-collapse:collapse;font-size:.92rem;font-variant-numeric:tabular-nums}
caption{text-align:left;color:var(--quiet);padding:.2rem 0}
th,td{padding:.25rem .6rem;border-bottom:1px solid var(--rule);text-align:left;vertical-align:top}
thead th{border-bottom:2px solid var(--ink);vertical-align:bottom}
.number{text-align:right;white-space:nowrap}thead .number{white-space:normal}
.warning h2{color:var(--warn)}.caution h2{color:var(--alert)}.caution{border-left:4px solid var(--alert);padding-left:1rem}
figure{margin:1rem 0;overflow-x:auto}figure svg{min-width:36rem;max-width:100%;height:auto;background:#fff}
@media(max-width:40rem){dl{grid-template-columns:1fr}dt{margin-top:.4rem}main{padding:.8rem}}
@media print{main{max-width:none;padding:0}.scroll{overflow:visible}table{font-size:8pt}tr{break-inside:avoid}}
`

import type { AnyResult } from '../domain/study.ts'
import { renderChart } from '../report/charts/render-chart.ts'
import { renderCsv } from '../report/render-csv.ts'
import { renderHtml } from '../report/render-html.ts'
import { renderJson } from '../report/render-json.ts'
import { renderMarkdown } from '../report/render-markdown.ts'
import { renderTable } from '../report/render-table.ts'
import type { OutputFormat } from './delivery.ts'
import type { Session } from './session.ts'

/** A result in one of the forms. */
export function renderResult(result: AnyResult, format: OutputFormat, look: Pick<Session, 'width' | 'colour'>): string {
  switch (format) {
    case 'json':
      return renderJson(result)
    case 'csv':
      return renderCsv(result)
    case 'markdown':
      return renderMarkdown(result)
    case 'html':
      return renderHtml(result)
    case 'svg':
      return renderChart(result)
    case 'table':
      return renderTable(result, look)
  }
}

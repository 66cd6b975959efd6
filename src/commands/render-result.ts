import type { AnyResult } from '../domain/study.ts'
import type { OutputFormat } from './delivery.ts'
import type { Session } from './session.ts'

/** A result in one of the forms; only that form's packages are loaded. */
export async function renderResult(
  result: AnyResult,
  format: OutputFormat,
  look: Pick<Session, 'width' | 'colour'>,
): Promise<string> {
  switch (format) {
    case 'json':
      return (await import('../report/render-json.ts')).renderJson(result)
    case 'csv':
      return (await import('../report/render-csv.ts')).renderCsv(result)
    case 'markdown':
      return (await import('../report/render-markdown.ts')).renderMarkdown(result)
    case 'html':
      return (await import('../report/render-html.ts')).renderHtml(result)
    case 'svg':
      return (await import('../report/charts/render-chart.ts')).renderChart(result)
    case 'table':
      return (await import('../report/render-table.ts')).renderTable(result, look)
  }
}

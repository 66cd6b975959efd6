import type { TrendResult } from '../domain/study.ts'
import type { ReportView } from './view-types.ts'
export function trendView(_: TrendResult): ReportView {
  throw new Error('later')
}

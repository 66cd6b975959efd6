import type { SwapResult } from '../domain/study.ts'
import type { ReportView } from './view-types.ts'
export function swapView(_: SwapResult): ReportView {
  throw new Error('later')
}

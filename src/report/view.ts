import type { AnyResult } from '../domain/study.ts'
import { rankView } from './rank-view.ts'
import { swapView } from './swap-view.ts'
import { trendView } from './trend-view.ts'
import type { ReportView } from './view-types.ts'
import { visibleDeep } from './visible.ts'
import { isRank, isSwap } from './words/words.ts'

/** Rows, order, display units and digits of a worded result, decided once for all renderers; free text made harmless. */
export function viewOf(result: AnyResult): ReportView {
  return visibleDeep(view(result))
}

function view(result: AnyResult): ReportView {
  if (isRank(result)) return rankView(result)
  return isSwap(result) ? swapView(result) : trendView(result)
}

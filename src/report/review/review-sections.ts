import type { ReviewResult } from '../../domain/review.ts'
import { visibleDeep } from '../visible.ts'
import { words } from '../words/words.ts'
import { assumptionSection } from './assumption-section.ts'
import { equationsSection, identitySection, openSection } from './closing-sections.ts'
import { doubtSection } from './doubt-section.ts'
import { eventSection } from './event-section.ts'
import { ledgerSection, rejectedSection } from './ledger-sections.ts'
import { cautionsSection, decisionSection, scopeSection } from './opening-sections.ts'
import { pointSection } from './point-section.ts'
import type { ReviewSection } from './review-types.ts'
import { frequencySection, loadSection, slopeSection, temperatureSection } from './trend-sections.ts'

/** Number, as the texts refer to it: position in the list, counted from 1. */
const order: readonly ((review: ReviewResult) => ReviewSection)[] = [
  decisionSection,
  cautionsSection,
  scopeSection,
  pointSection,
  ledgerSection,
  rejectedSection,
  temperatureSection,
  frequencySection,
  slopeSection,
  loadSection,
  eventSection,
  doubtSection,
  assumptionSection,
  equationsSection,
  openSection,
  identitySection,
]

export interface ReviewDocument {
  readonly title: string
  readonly sections: readonly ReviewSection[]
}

/** Everything the review document shows, in order, for every form of it; free text made harmless. */
export function reviewDocument(review: ReviewResult): ReviewDocument {
  words(review.rank)
  const { title } = review.rank.stage
  return visibleDeep({
    title: title === '' ? 'Choice of the rectifier' : `${title}: choice of the rectifier`,
    sections: order.map((make) => make(review)),
  })
}

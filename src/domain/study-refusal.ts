import type { SentenceData } from './result.ts'

/** Why a stage cannot be studied although every value in its file is legal. */
export type RefusalCode =
  | 'cannot-deliver'
  | 'no-candidate'
  | 'part-unknown'
  | 'quantity-not-applicable'
  | 'range-reversed'
  | 'range-outside'

/** Thrown by study/; commands turn it into an input problem (exit code 2). */
export class StudyRefusal extends Error {
  readonly code: RefusalCode
  readonly data: SentenceData
  constructor(code: RefusalCode, data: SentenceData) {
    super(code)
    this.code = code
    this.data = data
  }
}

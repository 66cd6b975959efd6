/**
 * One candidate with its draws. Index d of every array, and of every other candidate's arrays, is the same draw of
 * the stage, so candidates are compared draw by draw.
 */
export interface CandidateDraws {
  readonly id: string
  readonly accepted: boolean
  /** Stage loss of the nominal parameters; null without a stable temperature (never so where accepted). [W] */
  readonly nominalStageLoss: number | null
  /** Infinity where the draw has no stable temperature: the draw is lost. [W] */
  readonly stageLoss: Float64Array
  /** Sum of the rectifier's loss rows; read only where the draw is not lost. [W] */
  readonly total: Float64Array
  /** Read only where the draw is not lost. [K] */
  readonly junction: Float64Array
}

/** The draw has a stable temperature. */
export function isSettled(stageLoss: number): boolean {
  return Number.isFinite(stageLoss)
}

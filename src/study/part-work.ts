import type { RectifierRecord } from '../domain/rectifier.ts'
import type { Stage } from '../domain/stage.ts'
import { prepareCandidate } from './candidate.ts'
import { drawCandidate, drawStage, type PartDraws } from './draw-candidate.ts'
import { type ProfileResult, runProfile } from './duty-profile.ts'
import { judge } from './judge-candidate.ts'
import { type Screened, screenPart } from './screen-part.ts'

/**
 * Work on parts that asks nothing of other parts, as plain data: done here or elsewhere, at once or in portions, its
 * answers are the same, one for each part in the order given.
 */
export interface PartWork {
  readonly kind: keyof PartAnswers
  readonly stage: Stage
  readonly parts: readonly RectifierRecord[]
  /** The rectifier of a measured turn-on, where there is one. */
  readonly testRectifiers: readonly RectifierRecord[]
  readonly seed: number
  readonly draws: number
}

/** What each kind of work answers for a part. */
export interface PartAnswers {
  readonly screen: Screened
  /** Null without a temperature. */
  readonly draw: PartDraws | null
  readonly profile: ProfileResult
}

type PartAnswer = PartAnswers[keyof PartAnswers]

/** A study that hands out its work on parts and goes on with the answers. */
export type PartSteps<Result> = Generator<PartWork, Result, readonly PartAnswer[]>

/** Hands out one kind of work. */
export function* askFor<Kind extends keyof PartAnswers>(
  work: PartWork & { readonly kind: Kind },
): PartSteps<readonly PartAnswers[Kind][]> {
  // Whoever does the work answers by its kind.
  return (yield work) as readonly PartAnswers[Kind][]
}

/** Does a piece of work. */
export function doPartWork(work: PartWork): readonly PartAnswer[] {
  switch (work.kind) {
    case 'screen':
      return work.parts.map((record) => screenPart(work.stage, record, work.testRectifiers))
    case 'draw':
      return drawParts(work)
    case 'profile':
      return work.parts.map((record) => profilePart(work, record))
  }
}

/** Goes through a study's steps, doing all of its work here. */
export function doAllSteps<Result>(steps: PartSteps<Result>): Result {
  let step = steps.next()
  while (step.done !== true) step = steps.next(doPartWork(step.value))
  return step.value
}

function drawParts({ stage, parts, testRectifiers, seed, draws }: PartWork): readonly (PartDraws | null)[] {
  const shared = drawStage(stage, seed, draws)
  return parts.map((record) => {
    const candidate = prepareCandidate(stage, record, testRectifiers)
    const { point, reasons } = judge(candidate)
    return point === null ? null : drawCandidate(candidate, point, reasons.length === 0, shared, seed)
  })
}

function profilePart({ stage, testRectifiers }: PartWork, record: RectifierRecord): ProfileResult {
  return runProfile(prepareCandidate(stage, record, testRectifiers), stage.dutyProfile ?? [])
}

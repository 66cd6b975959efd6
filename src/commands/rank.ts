import { words } from '../report/words/words.ts'
import { rankSteps } from '../study/rank.ts'
import { deliverResult } from './deliver.ts'
import { chooseDelivery, resultForms } from './delivery.ts'
import { doSteps } from './do-steps.ts'
import { exitCodeOf } from './exit-code.ts'
import { readStudy, type StudyOptions } from './read-study.ts'
import { checkTarget } from './replace-file.ts'
import type { Session } from './session.ts'
import { studyStage } from './study-stage.ts'

/** `ebbwatt rank STAGE` */
export async function runRank(stagePath: string, options: StudyOptions, session: Session): Promise<number> {
  const delivery = chooseDelivery(options, resultForms)
  const { stage, records, settings, files } = readStudy(stagePath, options, session)
  if (delivery.target !== null) checkTarget(delivery.target, files)
  const result = words(
    await studyStage(stagePath, session, () => doSteps(rankSteps(stage, records, settings), session)),
  )
  await deliverResult(result, delivery, files, session)
  return exitCodeOf(result.candidates, result.warnings, options.strict === true)
}

import { words } from '../report/words/words.ts'
import { swap } from '../study/swap.ts'
import { deliverResult } from './deliver.ts'
import { chooseDelivery, resultForms } from './delivery.ts'
import { exitCodeOf } from './exit-code.ts'
import { CommandFailure, failure } from './failure.ts'
import { readStudy, type StudyOptions, unknownIds } from './read-study.ts'
import { checkTarget } from './replace-file.ts'
import type { Session } from './session.ts'
import { studyStage } from './study-stage.ts'

export interface SwapOptions extends StudyOptions {
  readonly from?: string
  readonly to: string
}

/** `ebbwatt swap STAGE --from ID --to ID` */
export async function runSwap(stagePath: string, options: SwapOptions, session: Session): Promise<number> {
  const delivery = chooseDelivery(options, resultForms)
  const { stage, records, settings, files } = readStudy(stagePath, options, session)
  if (delivery.target !== null) checkTarget(delivery.target, files)
  const from = options.from ?? stage.incumbent
  if (from === null) {
    throw failure({
      code: 'option-unusable',
      path: '--from',
      found: 'the stage names no incumbent',
      expected: 'the id of the part in use',
    })
  }
  const unknown = [...unknownIds('--from', [from], records), ...unknownIds('--to', [options.to], records)]
  if (unknown.length > 0) throw new CommandFailure(unknown)
  const result = words(
    await studyStage(stagePath, session, () => swap(stage, records, { from, to: options.to }, settings)),
  )
  await deliverResult(result, delivery, files, session)
  return exitCodeOf([result.from, result.to], result.warnings, options.strict === true)
}

import type { StageKind } from '../domain/stage.ts'
import type { TrendQuantity, TrendRequest, TrendResult } from '../domain/study.ts'
import type { StudyRefusal } from '../domain/study-refusal.ts'
import { parseQuantity } from '../input/units/parse-quantity.ts'
import type { QuantityKindName } from '../input/units/quantity-kinds.ts'
import { didYouMean } from '../problems/nearest.ts'
import { words } from '../report/words/words.ts'
import { trend } from '../study/trend.ts'
import { deliverResult } from './deliver.ts'
import { chooseDelivery, resultForms } from './delivery.ts'
import { failure } from './failure.ts'
import { readStudy, type StudyOptions } from './read-study.ts'
import { checkTarget } from './replace-file.ts'
import type { Session } from './session.ts'
import { type AskedBy, studyStage } from './study-stage.ts'

export interface TrendOptions extends StudyOptions {
  readonly over: string
  readonly from: string
  readonly to: string
  readonly steps: number
  readonly log?: boolean
}

/** `ebbwatt trend STAGE --over QUANTITY --from X --to Y` */
export async function runTrend(stagePath: string, options: TrendOptions, session: Session): Promise<number> {
  const delivery = chooseDelivery(options, resultForms)
  const request = readRequest(options)
  const { stage, records, settings, files } = readStudy(stagePath, options, session)
  if (delivery.target !== null) checkTarget(delivery.target, files)
  const study = () => trend(stage, records, request, settings)
  const result = words(await studyStage(stagePath, session, study, askedBy(options, stage.kind)))
  await deliverResult(result, delivery, files, session)
  return exitCode(result, options.strict === true)
}

/** A point of a trend carries no provenance, so `--strict` looks at the warnings and at what is extrapolated far. */
function exitCode({ points, warnings }: TrendResult, strict: boolean): 0 | 3 | 4 {
  const accepted = points.flatMap(({ candidates }) => candidates.filter((candidate) => candidate.accepted))
  if (accepted.length === 0) return 3
  const warned = new Set(warnings.map(({ candidate }) => candidate))
  return strict && accepted.some(({ id, extrapolated }) => extrapolated || warned.has(id)) ? 4 : 0
}

/** Which option asked for what the study refuses. A buck cannot run from too little, the others from too much. */
function askedBy({ from, to }: TrendOptions, kind: StageKind) {
  return ({ code, data: { path } }: StudyRefusal): AskedBy | null => {
    if (code === 'quantity-not-applicable') return { path: '--over' }
    if (code !== 'range-outside') return null
    return path === 'input' && kind !== 'buck' ? { path: '--to', found: to } : { path: '--from', found: from }
  }
}

const kindOf: Readonly<Record<TrendQuantity, QuantityKindName>> = {
  frequency: 'frequency',
  load: 'share',
  slope: 'slope',
  ambient: 'temperature',
  input: 'voltage',
  inductance: 'inductance',
}

function readRequest({ over, from, to, steps, log }: TrendOptions): TrendRequest {
  if (!isQuantity(over)) {
    const known = Object.keys(kindOf)
    throw failure({
      code: 'option-unusable',
      path: '--over',
      found: `"${over}" is no quantity of a trend`,
      expected: `one of ${known.join(', ')}`,
      hint: didYouMean(over, known),
    })
  }
  const request = {
    over,
    from: readEnd('--from', from, over),
    to: readEnd('--to', to, over),
    steps,
    logarithmic: log === true,
  }
  if (request.from >= request.to) {
    throw failure({ code: 'range-reversed', path: '--from', found: `"${from}"`, expected: `"${to}"`, hint: '' })
  }
  if (request.logarithmic && over === 'ambient') {
    throw failure({
      code: 'option-unusable',
      path: '--log',
      found: 'equal ratios of temperatures say nothing',
      expected: 'equal steps over ambient',
    })
  }
  return request
}

function isQuantity(text: string): text is TrendQuantity {
  return Object.hasOwn(kindOf, text)
}

function readEnd(option: string, text: string, over: TrendQuantity): number {
  const value = parseQuantity(text, { kind: kindOf[over], sign: 'positive' })
  if (typeof value === 'number') return value
  const { code, expected, hint } = value
  throw failure({ code, path: option, found: text, expected, hint })
}

import { readdirSync, readFileSync } from 'node:fs'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { readRecords } from '../../src/input/read-records.ts'
import { readStage } from '../../src/input/read-stage.ts'
import { settle } from '../../src/stage/thermal-balance.ts'
import { type Candidate, prepareCandidate } from '../../src/study/candidate.ts'

/** A stage of the demonstration catalogue with every record there is. */
export interface Demo {
  readonly stage: Stage
  readonly records: readonly RectifierRecord[]
}

const folder = 'catalogs-demo/rectifiers'

export function loadDemo(name: string): Demo {
  const path = `catalogs-demo/stages/${name}.yaml`
  const stage = readStage(readFileSync(path, 'utf8'), path).value!.stage
  const records = readdirSync(folder).flatMap((file) => {
    return readRecords(readFileSync(`${folder}/${file}`, 'utf8'), file).value!
  })
  return { stage: { ...stage, dutyProfile: null }, records }
}

/** The stage's own candidates that have a temperature, ready to be solved at the bench's slopes. */
export function candidatesOf({ stage, records }: Demo): readonly Candidate[] {
  const chosen = records.filter(({ id }) => stage.candidates?.includes(id))
  return chosen.map((record) => prepareCandidate(stage, record, records)).filter(({ kernel }) => settle(kernel))
}

/** The demonstration with its candidates repeated under other names until there are `count`. */
export function widen({ stage, records }: Demo, count: number): Demo {
  const chosen = records.filter(({ id }) => stage.candidates?.includes(id))
  const many = Array.from({ length: count }, (_, k) => {
    const record = chosen[k % chosen.length]!
    return { ...record, id: `${record.id}-${k}` }
  })
  return { stage: { ...stage, candidates: many.map(({ id }) => id), incumbent: null }, records: many }
}

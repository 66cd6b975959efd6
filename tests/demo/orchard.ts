import { readdirSync, readFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { CandidateResult, RankResult } from '../../src/domain/result.ts'
import { readRecords } from '../../src/input/read-records.ts'
import { readStage } from '../../src/input/read-stage.ts'
import { rank } from '../../src/study/rank.ts'

export const recordFiles = listYaml('catalogs-demo/rectifiers')
export const stageFiles = listYaml('catalogs-demo/stages')

function listYaml(folder: string): readonly string[] {
  return readdirSync(folder)
    .filter((file) => file.endsWith('.yaml'))
    .map((file) => `${folder}/${file}`)
}

export const records: readonly RectifierRecord[] = recordFiles.flatMap(recordsIn)

function recordsIn(path: string): readonly RectifierRecord[] {
  if (!path.endsWith('.yaml')) return listYaml(path).flatMap(recordsIn)
  const reading = readRecords(readFileSync(path, 'utf8'), path)
  if (reading.value === null) throw new Error(`${path} does not read: ${JSON.stringify(reading.problems)}`)
  return reading.value
}

export function recordOf(id: string): RectifierRecord {
  const found = records.find((record) => record.id === id)
  if (found === undefined) throw new Error(`no demonstration record ${id}`)
  return found
}

/** The demonstration stage of that name, ranked; `change` swaps records before. */
export function rankDemo(
  name: string,
  change: (record: RectifierRecord) => RectifierRecord = (record) => record,
): RankResult {
  const file = `catalogs-demo/stages/${name}.yaml`
  const reading = readStage(readFileSync(file, 'utf8'), file)
  if (reading.value === null) throw new Error(`${file} does not read: ${JSON.stringify(reading.problems)}`)
  const ofStage = reading.value.records.flatMap((path) => recordsIn(join(dirname(file), path)))
  return rank(reading.value.stage, ofStage.map(change), { seed: 1, draws: 1000, version: '0', inputs: [] })
}

export function candidateOf(result: RankResult, id: string): CandidateResult {
  const found = result.candidates.find((candidate) => candidate.id === id)
  if (found === undefined) throw new Error(`${id} is no candidate of ${result.stage.title}`)
  return found
}

export function reasonsOf(result: RankResult, id: string): readonly string[] {
  return candidateOf(result, id).reasons.map(({ code }) => code)
}

export function warnedAbout(result: RankResult, id: string): readonly string[] {
  return result.warnings.filter(({ candidate }) => candidate === id).map(({ code }) => code)
}

import { readFileSync } from 'node:fs'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { CandidateResult, RankResult } from '../../src/domain/result.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { readRecords } from '../../src/input/read-records.ts'
import { readStage } from '../../src/input/read-stage.ts'
import type { Reading } from '../../src/problems/problem.ts'
import { rank } from '../../src/study/rank.ts'
import { records as shelf } from '../demo/orchard.ts'
import { kelvin, stage } from '../stage/samples.ts'
import { settings } from '../study/settings.ts'

/** No resistance to a case: the junction stands at its temperature. */
export const idealCooling = { kind: 'case', junctionToCase: 1e-9, caseToSink: 0 } as const

/** 400 V, 200 A/us, 100 kHz, 8 A without ripple, and a case of 125 °C: where a sheet's hot rows are read. */
export const hotStage = stage({
  input: { voltage: 200 },
  output: { current: 4 },
  inductor: { inductance: 1, resistance: 0 },
  switch: { onResistance: 0 },
  cooling: { kind: 'case', caseTemperature: kelvin(125) },
})

/** A stage as an engineer has typed it. */
export function typedStage(text: string): Stage {
  return usable(readStage(text, 'stage.yaml')).stage
}

/** Records as an engineer has typed them. */
export function typedParts(text: string): readonly RectifierRecord[] {
  return usable(readRecords(text, 'parts.yaml'))
}

function usable<T>({ value, problems }: Reading<T>): T {
  if (value === null) throw new Error(JSON.stringify(problems))
  return value
}

/** A stage file of the demonstration, after a change of its text. */
export function demoStage(name: string, change: (text: string) => string = (text) => text): Stage {
  const text = readFileSync(`catalogs-demo/stages/${name}.yaml`, 'utf8')
  return typedStage(change(text))
}

/** Ranks parts of the demonstration's shelf, or others; without draws where only nominal figures are looked at. */
export function rankShelf(stage: Stage, draws = 0, parts: readonly RectifierRecord[] = shelf): RankResult {
  return rank(stage, parts, settings(draws))
}

export function sum(values: readonly (number | null)[]): number {
  return values.reduce<number>((total, value) => total + (value ?? Number.NaN), 0)
}

/** The six rows of a candidate without their total. */
export function sixRows({ losses_w: { total: _, ...rows } }: CandidateResult): readonly (number | null)[] {
  return Object.values(rows)
}

/** Accepted parts in the order of their ranks. */
export function placed({ candidates }: RankResult): readonly CandidateResult[] {
  return candidates.filter(({ accepted }) => accepted)
}

/** Which of the wordings a long text lacks: a failure then shows these and not the text. */
export function missing(text: string, ...wanted: readonly RegExp[]): readonly string[] {
  return wanted.filter((each) => !each.test(text)).map(String)
}

import { readFileSync } from 'node:fs'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { CandidateResult, RankResult } from '../../src/domain/result.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { readRecords } from '../../src/input/read-records.ts'
import { readStage } from '../../src/input/read-stage.ts'
import type { Reading } from '../../src/problems/problem.ts'
import { rank } from '../../src/study/rank.ts'
import { records as shelf } from '../demo/orchard.ts'
import { settings } from '../study/settings.ts'

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

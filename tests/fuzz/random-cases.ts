import fc, { type Arbitrary } from 'fast-check'
import { mutatedCapture, mutatedCatalogue, mutatedCheck, mutatedProfile, mutatedStudy, noise } from './demo-cases.ts'
import type { FuzzCase } from './fuzz-case.ts'
import { randomCapture } from './random-capture.ts'
import { rankOptions, reviewOptions, swapOptions, trendOptions } from './random-options.ts'
import { randomRecord } from './random-records.ts'
import { randomStage } from './random-stage.ts'

/** YAML holds JSON, and JSON is quick to write. */
const validStudy: Arbitrary<FuzzCase> = fc
  .tuple(
    randomStage,
    randomRecord('a'),
    randomRecord('b'),
    fc.oneof(
      { weight: 9, arbitrary: rankOptions },
      { weight: 3, arbitrary: trendOptions },
      { weight: 3, arbitrary: swapOptions(['a', 'b']) },
      { weight: 1, arbitrary: reviewOptions },
    ),
  )
  .map(([stage, one, other, { command, options }]) => ({
    kind: `random ${command}`,
    files: { 'stage.yaml': JSON.stringify(stage), 'parts.yaml': JSON.stringify([one, other]) },
    command,
    operands: ['stage.yaml'],
    options,
  }))

/** Everything the campaign tries. */
export const anyCase: Arbitrary<FuzzCase> = fc.oneof(
  { weight: 30, arbitrary: validStudy },
  { weight: 25, arbitrary: mutatedStudy },
  { weight: 8, arbitrary: randomCapture },
  { weight: 6, arbitrary: mutatedCapture },
  { weight: 6, arbitrary: mutatedCatalogue },
  { weight: 4, arbitrary: mutatedProfile },
  { weight: 12, arbitrary: mutatedCheck },
  { weight: 9, arbitrary: noise },
)

import { validateStage } from '#validators'
import type { Stage, StageKind } from '../domain/stage.ts'
import type { Reading } from '../problems/problem.ts'
import { boundProblems, joinProblems } from './bound-problems.ts'
import { checkStage } from './check-stage.ts'
import { tableInstead, wrongKind } from './file-kind.ts'
import {
  group,
  has,
  quantity,
  quantityOr,
  required,
  rootSection,
  type Section,
  startReader,
  text,
  texts,
} from './section.ts'
import { checkShape } from './shape.ts'
import { coolingFrom, dutyProfileFrom, inputFrom, limitsFrom, outputFrom, parallelFrom } from './stage-parts.ts'
import { spreadFrom, switchFrom } from './stage-switch.ts'
import { type Place, readYaml } from './yaml/read-yaml.ts'

/** A part that the stage file names, and where it does so. */
interface NamedPart {
  readonly id: string
  /** "candidates[2]", "incumbent", "switch.turn_on.rectifier". */
  readonly path: string
  readonly place: Place
}

/** A stage file: the stage itself, and what it refers to outside itself. */
export interface StageDocument {
  readonly file: string
  readonly stage: Stage
  /** Files or folders of records, as written: relative to the stage file. */
  readonly records: readonly string[]
  /** CSV file of the duty profile, as written; the stage's own profile is null then. */
  readonly dutyProfileFile: string | null
  readonly named: readonly NamedPart[]
}

/**
 * Reads a stage file: SI, temperatures in kelvin, defaults filled in and listed in `stage.assumed`. Every problem
 * of shape, unit and sense is told at once with its place; the stage comes only when there is none.
 */
export function readStage(sourceText: string, file: string): Reading<StageDocument> {
  const table = tableInstead(file, 'stage')
  if (table !== null) return { value: null, problems: table, warnings: [] }
  const { yaml, problems } = readYaml(sourceText, file, 'a stage')
  if (yaml === null) return { value: null, problems: boundProblems(problems), warnings: [] }
  const wrong = wrongKind(yaml.data, file, 'stage')
  if (wrong !== null) return { value: null, problems: wrong, warnings: [] }
  const reader = startReader(yaml)
  const shape = checkShape(yaml, validateStage)
  const root = rootSection(reader)
  const document = documentFrom(root, file)
  checkStage(root, document.stage)
  const all = joinProblems(problems, shape, reader.problems)
  const warnings = boundProblems(reader.warnings)
  return all.length > 0
    ? { value: null, problems: boundProblems(all), warnings }
    : { value: document, problems: [], warnings }
}

/** The records that a stage file names, also where the stage itself cannot be used. */
export function recordPaths(sourceText: string, file: string): readonly string[] {
  const { yaml } = readYaml(sourceText, file, 'a stage')
  return yaml === null ? [] : texts(rootSection(startReader(yaml)), 'records').map(({ text }) => text)
}

function documentFrom(root: Section, file: string): StageDocument {
  return {
    file,
    stage: stageFrom(root),
    records: texts(root, 'records').map(({ text }) => text),
    dutyProfileFile: Array.isArray(root.data.duty_profile) ? null : text(group(root, 'duty_profile'), 'file'),
    named: namedParts(root),
  }
}

function stageFrom(root: Section): Stage {
  const inductor = group(root, 'inductor')
  return {
    kind: (text(root, 'stage') ?? 'buck') as StageKind,
    title: text(root, 'title'),
    input: inputFrom(root),
    output: outputFrom(group(root, 'output')),
    frequency: required(root, 'frequency', 'frequency', 'positive'),
    inductor: {
      inductance: required(inductor, 'inductance', 'inductance', 'positive'),
      resistance: quantityOr(inductor, 'resistance', 'resistance', 'not-negative', '0 ohm'),
      coreLoss: quantity(inductor, 'core_loss', 'power', 'not-negative') ?? 0,
    },
    switch: switchFrom(group(root, 'switch')),
    loopInductance: quantity(root, 'loop_inductance', 'inductance', 'not-negative'),
    snubberCapacitance: quantity(group(root, 'snubber'), 'capacitance', 'capacitance', 'not-negative') ?? 0,
    cooling: coolingFrom(group(root, 'cooling'), has(group(root, 'switch'), 'thermal')),
    limits: limitsFrom(group(root, 'limits')),
    spread: spreadFrom(root),
    fixedLosses: quantity(root, 'fixed_losses', 'power', 'not-negative') ?? 0,
    dutyProfile: dutyProfileFrom(root),
    candidates: has(root, 'candidates') ? [...new Set(texts(root, 'candidates').map(({ text }) => text))] : null,
    incumbent: text(root, 'incumbent'),
    parallel: parallelFrom(root),
    assumed: root.reader.assumed,
  }
}

function namedParts(root: Section): readonly NamedPart[] {
  const { place } = root.reader.yaml
  const candidates = texts(root, 'candidates').map(({ text, path }, index) => ({
    id: text,
    path: `candidates[${index + 1}]`,
    place: place(path, 'value'),
  }))
  const single = (id: string | null, path: readonly string[]): readonly NamedPart[] =>
    id === null ? [] : [{ id, path: path.join('.'), place: place(path, 'value') }]
  const rectifier = text(group(group(root, 'switch'), 'turn_on'), 'rectifier')
  return [
    ...candidates,
    ...single(text(root, 'incumbent'), ['incumbent']),
    ...single(rectifier, ['switch', 'turn_on', 'rectifier']),
  ]
}

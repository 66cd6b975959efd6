import { dirname, isAbsolute, join, relative, sep } from 'node:path'
import type { RectifierRecord } from '../domain/rectifier.ts'
import type { Stage } from '../domain/stage.ts'
import type { StudySettings } from '../domain/study.ts'
import { checkReferences, listedIds } from '../input/check-references.ts'
import { readProfile } from '../input/read-profile.ts'
import { readStage, recordPaths, type StageDocument } from '../input/read-stage.ts'
import { didYouMean } from '../problems/nearest.ts'
import type { Problem } from '../problems/problem.ts'
import type { OutputOptions } from './delivery.ts'
import { collecting, type Desk, openDesk, readAt, settleDesk } from './desk.ts'
import { onCommandLine } from './failure.ts'
import { type RecordOptions, readAllRecords } from './read-all-records.ts'
import { recordFiles } from './record-files.ts'
import type { Session } from './session.ts'

/** Options that every study of a stage takes. */
export interface StudyOptions extends OutputOptions, RecordOptions {
  readonly records?: readonly string[]
  readonly only?: readonly string[]
  readonly seed: number
  readonly draws: number
  readonly top?: number
}

/** Everything a study needs, read and checked. */
export interface StudyMaterial {
  readonly stage: Stage
  readonly records: readonly RectifierRecord[]
  readonly settings: StudySettings
  /** Every file read, as it can be opened from here. */
  readonly files: readonly string[]
}

/** Reads a stage and its records; every problem of every file is told at once. */
export function readStudy(stagePath: string, options: StudyOptions, session: Session): StudyMaterial {
  const desk = openDesk()
  const { stage, records } = readStageAndRecords(desk, stagePath, options, session)
  settleDesk(desk, options.quiet === true, session)
  if (stage === null) throw new Error('a stage without a value and without a problem')
  const only = [...new Set(options.only ?? [])]
  const { seed, draws, top } = options
  return {
    stage: only.length === 0 ? stage : { ...stage, candidates: only },
    records,
    settings: {
      seed,
      draws,
      ...(top === undefined ? {} : { top }),
      version: session.version,
      inputs: inputsOf(desk, stagePath),
      tables: desk.tables.map((table) => ({ ...table, path: seenFromStage(table.path, stagePath) })),
    },
    files: [...desk.texts.keys()],
  }
}

/** The stage and all records it names, with those of the command line; what they say of each other is checked. */
export function readStageAndRecords(
  desk: Desk,
  stagePath: string,
  options: RecordOptions & Pick<StudyOptions, 'records' | 'only'>,
  session: Session,
): { readonly stage: Stage | null; readonly records: readonly RectifierRecord[] } {
  const { records: further = [], only = [] } = options
  const document = readStageFile(desk, stagePath)
  const text = desk.texts.get(stagePath)
  // A stage with problems still says where its records are: theirs belong into the same list.
  const paths = document?.records ?? (text === undefined ? [] : recordPaths(text, stagePath))
  const named = paths.map((path) => seenFrom(stagePath, path))
  const files = [
    ...named.flatMap((path) => collecting(desk, () => recordFiles(path, `named by ${stagePath}`)) ?? []),
    ...further.flatMap((path) => collecting(desk, () => recordFiles(path)) ?? []),
  ]
  const records = readAllRecords(desk, files, options, session)
  // A file that could not be read hides its ids: calling them unknown would only add noise.
  const complete = desk.problems.length === 0
  desk.problems.push(...checkReferences(complete ? document : null, records))
  if (complete) desk.problems.push(...unknownIds('--only', only, records))
  return { stage: document?.stage ?? null, records }
}

/** A stage with its duty profile, which may stand in a table of its own. */
function readStageFile(desk: Desk, stagePath: string): StageDocument | null {
  const document = readAt(desk, stagePath, readStage)
  if (document === null || document.dutyProfileFile === null) return document
  const { stage } = document
  const read = (text: string, path: string) => readProfile(text, path, stage)
  const dutyProfile = readAt(desk, seenFrom(stagePath, document.dutyProfileFile), read)
  return { ...document, stage: { ...stage, dutyProfile } }
}

/** A path in a file is seen from that file. */
function seenFrom(file: string, path: string): string {
  return isAbsolute(path) ? path : join(dirname(file), path)
}

/** Ids on the command line that no record bears, each with the nearest that one does. */
export function unknownIds(
  option: string,
  ids: readonly string[],
  records: readonly RectifierRecord[],
): readonly Problem[] {
  const known = records.map(({ id }) => id)
  return ids
    .filter((id) => !known.includes(id))
    .map((id) => ({
      ...onCommandLine(option),
      code: 'id-unknown',
      found: id,
      expected: listedIds(known),
      hint: didYouMean(id, known),
    }))
}

/** Paths as reached from the stage file, with slashes, so that the same inputs give the same bytes from any folder. */
function inputsOf({ fingerprints }: Desk, stagePath: string): StudySettings['inputs'] {
  return [...fingerprints]
    .map(([path, sha256]) => ({ path: seenFromStage(path, stagePath), sha256 }))
    .sort((one, other) => (one.path < other.path ? -1 : 1))
}

function seenFromStage(path: string, stagePath: string): string {
  return relative(dirname(stagePath), path).split(sep).join('/')
}

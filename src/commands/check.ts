import type { RectifierRecord } from '../domain/rectifier.ts'
import { readCapture } from '../input/capture-settings.ts'
import { checkReferences } from '../input/check-references.ts'
import { readRecords } from '../input/read-records.ts'
import { collecting, type Desk, openDesk, readAt, settleDesk } from './desk.ts'
import { readText } from './read-file.ts'
import { readStageAndRecords } from './read-study.ts'
import { recordFiles } from './record-files.ts'
import type { Session } from './session.ts'

export interface CheckOptions {
  readonly json?: boolean
  readonly quiet?: boolean
}

type FileKind = 'stage' | 'records' | 'capture'

/** `ebbwatt check FILE...`: what is wrong in any of them, all at once; a stage brings the records it names. */
export async function runCheck(paths: readonly string[], options: CheckOptions, session: Session): Promise<number> {
  const desk = openDesk()
  const files = new Set(paths.flatMap((path) => collecting(desk, () => recordFiles(path)) ?? []))
  const checked = [...files].flatMap((path) => {
    const kind = collecting(desk, () => kindOf(readText(path).text))
    return kind === null ? [] : [{ path, kind }]
  })
  const records = checked.flatMap(({ path, kind }) => checkAs[kind](desk, path))
  desk.problems.push(...checkReferences(null, records))
  settleDesk(desk, options.quiet === true, session)
  if (options.json === true) session.print(`${JSON.stringify({ files: checked, warnings: desk.warnings }, null, 2)}\n`)
  else if (options.quiet !== true) session.print(checked.map(({ path, kind }) => `${path}: ${kind}, usable\n`).join(''))
  return 0
}

/** Returns the records of a record file: those that were named together must not share an id. */
const checkAs: Readonly<Record<FileKind, (desk: Desk, path: string) => readonly RectifierRecord[]>> = {
  stage: (desk, path) => {
    readStageAndRecords(desk, path, {})
    return []
  },
  capture: (desk, path) => {
    readAt(desk, path, readCapture)
    return []
  },
  records: (desk, path) => readAt(desk, path, readRecords) ?? [],
}

/** Each kind of file has a key at its top that no other has; what has none of them is read as records. */
function kindOf(text: string): FileKind {
  const hasTopKey = (key: string) => new RegExp(`^(?:\\{[ \\t]*)?["']?${key}["']?[ \\t]*:`, 'm').test(text)
  if (hasTopKey('stage')) return 'stage'
  return hasTopKey('capture') ? 'capture' : 'records'
}

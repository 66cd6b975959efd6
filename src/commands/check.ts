import type { RectifierRecord } from '../domain/rectifier.ts'
import { readCapture } from '../input/capture-settings.ts'
import { checkReferences } from '../input/check-references.ts'
import { readMapping } from '../input/read-mapping.ts'
import { readRecords } from '../input/read-records.ts'
import { renderJson } from '../report/render-json.ts'
import { collecting, type Desk, openDesk, readAt, settleDesk } from './desk.ts'
import { readText } from './read-file.ts'
import { readStageAndRecords } from './read-study.ts'
import { recordFiles } from './record-files.ts'
import type { Session } from './session.ts'

export interface CheckOptions {
  readonly json?: boolean
  readonly quiet?: boolean
}

type FileKind = 'stage' | 'records' | 'capture' | 'mapping'

/** `ebbwatt check FILE...`: what is wrong in any of them, all at once; a stage brings the records it names. */
export async function runCheck(paths: readonly string[], options: CheckOptions, session: Session): Promise<number> {
  const desk = openDesk()
  const files = new Set(paths.flatMap((path) => collecting(desk, () => recordFiles(path)) ?? []))
  const checked = [...files].flatMap((path) => {
    const kind = collecting(desk, () => kindOf(readText(path).text))
    return kind === null ? [] : [{ path, kind }]
  })
  const records: RectifierRecord[] = []
  for (const { path, kind } of checked) records.push(...checkAs[kind](desk, path, session))
  desk.problems.push(...checkReferences(null, records))
  settleDesk(desk, options.quiet === true, session)
  if (options.json === true) session.print(renderJson({ files: checked, warnings: desk.warnings }))
  else if (options.quiet !== true) session.print(checked.map(({ path, kind }) => `${path}: ${kind}, usable\n`).join(''))
  return 0
}

type Check = (desk: Desk, path: string, session: Session) => readonly RectifierRecord[]

/** Returns the records of a record file: those that were named together must not share an id. */
const checkAs: Readonly<Record<FileKind, Check>> = {
  stage: (desk, path, session) => {
    readStageAndRecords(desk, path, {}, session)
    return []
  },
  capture: (desk, path) => {
    readAt(desk, path, readCapture)
    return []
  },
  mapping: (desk, path) => {
    readAt(desk, path, readMapping)
    return []
  },
  records: (desk, path) => readAt(desk, path, readRecords) ?? [],
}

/** Each kind of file has a key at its top that no other has; what has none of them is read as records. */
const kindKeys: readonly (readonly [FileKind, RegExp])[] = [
  ['stage', topKey('stage')],
  ['capture', topKey('capture')],
  ['mapping', topKey('catalogue')],
]

function topKey(key: string): RegExp {
  return new RegExp(`^(?:\\{[ \\t]*)?["']?${key}["']?[ \\t]*:`, 'm')
}

function kindOf(text: string): FileKind {
  return kindKeys.find(([, key]) => key.test(text))?.[0] ?? 'records'
}

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

type FileKind = 'stage' | 'records'

/** `ebbwatt check FILE...`: what is wrong in any of them, all at once; a stage brings the records it names. */
export async function runCheck(paths: readonly string[], options: CheckOptions, session: Session): Promise<number> {
  const desk = openDesk()
  const files = paths.flatMap((path) => collecting(desk, () => recordFiles([path])) ?? [])
  const checked = files.flatMap((path) => {
    const kind = collecting(desk, () => kindOf(readText(path).text))
    if (kind !== null) checkAs[kind](desk, path)
    return kind === null ? [] : [{ path, kind }]
  })
  settleDesk(desk, options.quiet === true, session)
  if (options.json === true) session.print(`${JSON.stringify({ files: checked, warnings: desk.warnings }, null, 2)}\n`)
  else if (options.quiet !== true) session.print(checked.map(({ path, kind }) => `${path}: ${kind}, usable\n`).join(''))
  return 0
}

const checkAs: Readonly<Record<FileKind, (desk: Desk, path: string) => void>> = {
  stage: (desk, path) => void readStageAndRecords(desk, path, {}),
  records: (desk, path) => void readAt(desk, path, readRecords),
}

/** Each kind of file has a key at its top that no other has; what has none of them is read as records. */
function kindOf(text: string): FileKind {
  return /^(?:\{\s*)?["']?stage["']?\s*:/m.test(text) ? 'stage' : 'records'
}

import type { AnyResult } from '../domain/study.ts'
import type { Delivery } from './delivery.ts'
import { renderResult } from './render-result.ts'
import { replaceFile } from './replace-file.ts'
import { breathe, type Session } from './session.ts'

const plainLook = { width: 120, colour: false }

/** Puts a result where it was asked for: stdout, a file, or with `--json -o` both. */
export async function deliverResult(
  result: AnyResult,
  { format, target, jsonOnStdout }: Delivery,
  inputs: readonly string[],
  session: Session,
): Promise<void> {
  const text = renderResult(result, format, target === null ? session : plainLook)
  await breathe()
  if (target !== null) replaceFile(target, text, inputs)
  if (target === null || jsonOnStdout) session.print(text)
  // A table of numbers has no room for sentences, so the cautions are told beside it, whatever else is silenced.
  if (format === 'csv' || format === 'svg') tellCautions(result, session)
}

function tellCautions({ cautions }: AnyResult, session: Session): void {
  for (const { code, text } of cautions) session.tell(`caution  ${code}  ${text}\n`)
}

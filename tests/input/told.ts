import { formatProblem } from '../../src/problems/format-problem.ts'
import type { Reading } from '../../src/problems/problem.ts'

type Reader = (text: string, file: string) => Reading<unknown>

/** Everything a person is told about a file: problems with their source lines, then warnings. */
export function told(reader: Reader, text: string, file = 'file.yaml'): string {
  const { problems, warnings } = reader(text, file)
  const lines = [
    ...problems.map((problem) => formatProblem(problem, text)),
    ...warnings.map((warning) => `warning: ${formatProblem(warning, text)}`),
  ]
  return `\n${lines.join('\n')}\n`
}

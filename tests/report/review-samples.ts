import { readFileSync } from 'node:fs'
import type { Stage } from '../../src/domain/stage.ts'
import { readStage } from '../../src/input/read-stage.ts'

export { records } from '../demo/orchard.ts'

/** A demonstration stage as read. */
export function stageOf(name: string): Stage {
  const file = `catalogs-demo/stages/${name}.yaml`
  const { value, problems } = readStage(readFileSync(file, 'utf8'), file)
  if (value === null) throw new Error(JSON.stringify(problems))
  return value.stage
}

/**
 * Writes catalogs-demo/captures from the list in demo-captures.ts, whose truth is known and whose noise is seeded.
 * Run after changing that list:  npm run tools && node dist/build/run-tool.js tests/capture/make-demo-captures.ts
 */
import { mkdirSync, writeFileSync } from 'node:fs'
import { demoCaptures } from './demo-captures.ts'

const folder = 'catalogs-demo/captures'
mkdirSync(folder, { recursive: true })
for (const { files } of demoCaptures()) {
  for (const [name, text] of Object.entries(files)) writeFileSync(`${folder}/${name}`, text)
}

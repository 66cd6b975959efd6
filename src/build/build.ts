/** `npm run build`: everything under dist/ but dist/build, which holds this program itself. */
import { readdirSync, rmSync, statSync } from 'node:fs'
import { join } from 'node:path'
import { compiledFile } from '../load-program.ts'
import { buildBundles } from './bundles.ts'
import { writeDeclarations } from './declarations.ts'
import { writeLicences } from './licences.ts'
import { precompile } from './precompile.ts'
import { buildValidators } from './validators.ts'

const begun = Date.now()
// V8 tells a text by its length alone: what it compiled of an older one must not outlive that.
rmSync(compiledFile, { force: true })
const validatorPackages = await buildValidators()
const [bundledPackages] = await Promise.all([buildBundles(), writeDeclarations()])
await precompile()
writeLicences([...validatorPackages, ...bundledPackages])
removeOlderThan(begun)

/** What an earlier build left behind goes last, so that a running program never finds its files gone. */
function removeOlderThan(time: number): void {
  for (const entry of readdirSync('dist', { withFileTypes: true, recursive: true })) {
    const path = join(entry.parentPath, entry.name)
    // A second's grace: some file systems keep whole seconds only.
    const stale = entry.isFile() && statSync(path).mtimeMs < time - 1000
    if (stale && !path.startsWith(join('dist', 'build'))) rmSync(path)
  }
}

import { execFile } from 'node:child_process'
import { existsSync, writeFileSync } from 'node:fs'
import { promisify } from 'node:util'

/** Only what the library's entry reaches: types of the command and of this build are nobody's business. */
const project = {
  extends: '../../tsconfig.json',
  compilerOptions: { rootDir: '../../src', outDir: '../types', emitDeclarationOnly: true, noCheck: true },
  files: ['../../src/index.ts'],
  include: [],
}

/** Writes the library's types under dist/types. */
export async function writeDeclarations(): Promise<void> {
  if (!existsSync('src/index.ts')) return
  writeFileSync('dist/build/tsconfig.json', JSON.stringify(project))
  await promisify(execFile)('node_modules/.bin/tsc', ['-p', 'dist/build'])
}

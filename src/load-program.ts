import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { fileURLToPath } from 'node:url'
import { Script } from 'node:vm'

export type Program = typeof import('./program.ts')

/** The text of the program as the build leaves it: one function expression that takes `require` and returns a Program. */
export const programFile = 'dist/program.cjs'
/** What V8 made of that text at build time. Any other version of Node refuses it and compiles the text itself. */
export const compiledFile = 'dist/program.compiled'

/** Loads the program from the package's folder, with what V8 compiled at build time where that fits. */
export function loadProgram(root: URL): Program {
  return runProgram(root, programScript(root, readIfThere(new URL(compiledFile, root))))
}

export function programScript(root: URL, cachedData?: Buffer): Script {
  const file = new URL(programFile, root)
  // esbuild writes ASCII only, and one-byte text is what V8 reads fastest.
  return new Script(readFileSync(file, 'latin1'), { filename: fileURLToPath(file), ...(cachedData && { cachedData }) })
}

export function runProgram(root: URL, script: Script): Program {
  return script.runInThisContext()(createRequire(new URL(programFile, root)))
}

function readIfThere(file: URL): Buffer | undefined {
  try {
    return readFileSync(file)
  } catch {
    return undefined
  }
}

import { lstatSync, readdirSync, statSync } from 'node:fs'
import { join } from 'node:path'
import { failure } from './failure.ts'
import { readingFailure } from './read-file.ts'

/**
 * The record files behind a path: itself, or all of a folder, searched through and through.
 * The order is that of the names, not of the disk, so two machines read alike. Linked folders are not followed: they may lead in circles.
 */
export function recordFiles(path: string, hint = ''): readonly string[] {
  if (!isFolder(path, hint)) return [path]
  const found = recordsBelow(path).toSorted()
  if (found.length > 0) return found
  throw failure({ file: path, code: 'file-empty', expected: 'a folder with records in .yaml or .yml files' })
}

function isFolder(path: string, hint: string): boolean {
  try {
    return statSync(path).isDirectory()
  } catch (error) {
    throw readingFailure(path, error, hint)
  }
}

function recordsBelow(folder: string): readonly string[] {
  return entriesOf(folder)
    .filter((name) => !name.startsWith('.'))
    .map((name) => join(folder, name))
    .flatMap((path) => {
      if (lstatSync(path).isDirectory()) return recordsBelow(path)
      return /\.ya?ml$/i.test(path) ? [path] : []
    })
}

function entriesOf(folder: string): readonly string[] {
  try {
    return readdirSync(folder)
  } catch (error) {
    throw readingFailure(folder, error)
  }
}

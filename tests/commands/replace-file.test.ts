import { execFileSync } from 'node:child_process'
import { linkSync, mkdirSync, readdirSync, readFileSync, statSync, symlinkSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { replaceFile } from '../../src/commands/replace-file.ts'
import { scratchFolder } from './scratch.ts'
import { messageOf } from './session-double.ts'

describe('replacing a file', () => {
  it('writes a new file and leaves nothing else behind', () => {
    const folder = scratchFolder()
    replaceFile(join(folder, 'new.json'), 'text\n', [])
    expect(readFileSync(join(folder, 'new.json'), 'utf8')).toBe('text\n')
    expect(readdirSync(folder)).toEqual(['new.json'])
  })

  it('keeps the permissions of the file it replaces', () => {
    const path = join(scratchFolder(), 'old.csv')
    writeFileSync(path, 'old', { mode: 0o600 })
    replaceFile(path, 'new', [])
    expect([readFileSync(path, 'utf8'), statSync(path).mode & 0o777]).toEqual(['new', 0o600])
  })

  it('refuses a folder, a symbolic link and a named pipe', () => {
    const folder = scratchFolder()
    mkdirSync(join(folder, 'folder.csv'))
    writeFileSync(join(folder, 'real.csv'), '')
    symlinkSync('real.csv', join(folder, 'link.csv'))
    execFileSync('mkfifo', [join(folder, 'pipe.csv')])
    const refusal = (name: string) =>
      messageOf(() => replaceFile(join(folder, name), 'x', [])).replace(`${folder}/`, '')
    expect(refusal('folder.csv')).toBe(
      'folder.csv  file-unwritable  cannot be written: it is a folder; name a file in it',
    )
    expect(refusal('link.csv')).toBe(
      'link.csv  file-unwritable  cannot be written: it is a symbolic link; name the file it leads to',
    )
    expect(refusal('pipe.csv')).toBe(
      'pipe.csv  file-unwritable  cannot be written: it is a pipe, socket or device; leave -o out and let the shell write',
    )
  })

  it('refuses an input file, also under a second name', () => {
    const folder = scratchFolder()
    const input = join(folder, 'stage.yaml')
    writeFileSync(input, 'stage: boost')
    linkSync(input, join(folder, 'twin.json'))
    expect(messageOf(() => replaceFile(join(folder, 'twin.json'), 'x', [input]))).toBe(
      `${folder}/twin.json  file-is-input  is read by this command and is not overwritten; name another file`,
    )
    expect(readFileSync(input, 'utf8')).toBe('stage: boost')
  })

  it('says that the folder is missing', () => {
    const folder = scratchFolder()
    expect(messageOf(() => replaceFile(join(folder, 'no', 'a.csv'), 'x', []))).toBe(
      `${folder}/no/a.csv  file-unwritable  cannot be written: the folder ${folder}/no does not exist; create it first`,
    )
  })
})

import { execFileSync } from 'node:child_process'
import { mkdirSync, symlinkSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { readText } from '../../src/commands/read-file.ts'
import { recordFiles } from '../../src/commands/record-files.ts'
import { scratchFolder } from './scratch.ts'
import { messageOf } from './session-double.ts'

describe('finding record files', () => {
  it('searches folders through and through, in the order of names, nothing twice', () => {
    const folder = scratchFolder()
    mkdirSync(join(folder, 'a', 'deep'), { recursive: true })
    for (const name of ['b.yaml', 'a/deep/z.yml', 'a/x.YAML', 'a/readme.txt', '.hidden.yaml'])
      writeFileSync(join(folder, name), '')
    symlinkSync(folder, join(folder, 'a', 'circle'))
    const found = recordFiles(folder).map((path) => path.slice(folder.length + 1))
    expect(found).toEqual(['a/deep/z.yml', 'a/x.YAML', 'b.yaml'])
  })

  it('says that a folder holds no records, or is not there', () => {
    const folder = scratchFolder()
    expect(messageOf(() => recordFiles(folder))).toBe(
      `${folder}  file-empty  holds nothing; wanted is a folder with records in .yaml or .yml files`,
    )
    expect(messageOf(() => recordFiles(join(folder, 'none'), 'named by stage.yaml'))).toBe(
      `${folder}/none  file-missing  there is no such file or folder (named by stage.yaml)`,
    )
  })
})

describe('reading a file', () => {
  it('drops a byte order mark and fingerprints the bytes', () => {
    const path = join(scratchFolder(), 'a.yaml')
    writeFileSync(path, '\uFEFFabc')
    expect(readText(path)).toEqual({
      text: 'abc',
      sha256: '1c28dc3f1f804a1ad9c9b4b4cf5e2658d16ad4ed08e3020d04a8d2865018947c',
    })
  })

  it('tells where bytes of another encoding begin', () => {
    const path = join(scratchFolder(), 'a.yaml')
    writeFileSync(path, Buffer.from([0x61, 0x0a, 0x62, 0xb5, 0x43]))
    expect(messageOf(() => readText(path))).toBe(
      `${path}:2:2  file-not-text  is not text in UTF-8: the bytes from here on are in another encoding; save it as UTF-8`,
    )
  })

  it.each(['folder', 'pipe', 'circle'])('never waits for what is no file: %s', (name) => {
    const folder = scratchFolder()
    mkdirSync(join(folder, 'folder'))
    execFileSync('mkfifo', [join(folder, 'pipe')])
    symlinkSync('circle', join(folder, 'circle'))
    const reasons = {
      folder: 'it is a folder',
      pipe: 'it is a pipe, socket or device (only regular files are read)',
      circle: 'its symbolic links lead in a circle',
    }
    expect(messageOf(() => readText(join(folder, name)))).toBe(
      `${folder}/${name}  file-unreadable  cannot be read: ${reasons[name as keyof typeof reasons]}`,
    )
  })
})

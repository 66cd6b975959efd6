import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { readMapping } from '../../src/input/read-mapping.ts'
import { readRecords } from '../../src/input/read-records.ts'
import { readStage } from '../../src/input/read-stage.ts'

const sources = readdirSync('src', { recursive: true, encoding: 'utf8' })
  .filter((name) => name.endsWith('.ts') && !name.startsWith('build/'))
  .map((name) => ({ name, text: readFileSync(join('src', name), 'utf8') }))

describe('nothing in a file is executed or fetched', () => {
  it('because no source can: no process, no network, no code from text', () => {
    const means =
      /\beval\(|new Function|node:(?:vm|child_process|http|https|net|dgram|tls|dns|inspector)\b|\bfetch\(|XMLHttpRequest|WebSocket|import\((?!'\.|'node:|'#)/
    // One file does: it compiles the program that the build left in the package, and nothing it is told.
    expect(sources.filter(({ text }) => means.test(text)).map(({ name }) => name)).toEqual(['load-program.ts'])
    const loader = sources.find(({ name }) => name === 'load-program.ts')!.text
    expect([...loader.matchAll(/new Script\(|eval|fetch/g)].map(([word]) => word)).toEqual(['new Script('])
    expect(
      [...loader.matchAll(/new URL\((\w+), root\)/g)]
        .map(([, name]) => name)
        .filter((name) => !/^(programFile|compiledFile)$/.test(name!)),
    ).toEqual([])
    expect(loader).toContain("programFile = 'dist/program.cjs'")
  })

  it('and no unit of a file reaches the expression parser', () => {
    const forms = [
      'import("fs")',
      'f(x)=1',
      'createUnit("x")',
      'V;1',
      'evaluate("1")',
      '[1,2]',
      'V.constructor',
      'to V',
      'V in A',
      'true ? V : A',
      'cos(1) V',
      '"V"',
    ]
    for (const form of forms) {
      const text = `stage: buck\ninput: {voltage: '5 ${form.replaceAll("'", "''")}'}\n`
      const { value, problems } = readStage(text, 'stage.yaml')
      expect(value).toBeNull()
      expect(problems.filter(({ path }) => path === 'input.voltage').map(({ code }) => code)).toHaveLength(1)
    }
  })

  it.each([
    '!!js/function "() => 1"',
    '!!js/undefined ""',
    '!<tag:yaml.org,2002:js/regexp> /a/',
    '!!python/object/apply:os.system [touch owned]',
    '!!binary aGVsbG8=',
    '!include other.yaml',
    '&a [*a]',
    '{<<: {a: 1}}',
  ])('nor does a tag, an anchor or a merge make anything: %s', (value) => {
    for (const reader of [readRecords, readStage, readMapping]) {
      expect(reader(`id: ${value}\n`, 'file.yaml').value).toBeNull()
    }
    expect(existsSync('owned')).toBe(false)
  })

  it('and names of object internals stay names', () => {
    for (const name of ['__proto__', 'constructor', 'prototype', 'toString', 'valueOf', 'hasOwnProperty']) {
      expect(readRecords(`id: a\n${name}: {polluted: 1}\n`, 'file.yaml').value).toBeNull()
    }
    expect(({} as Record<string, unknown>).polluted).toBeUndefined()
    expect(Object.prototype).not.toHaveProperty('polluted')
  })
})

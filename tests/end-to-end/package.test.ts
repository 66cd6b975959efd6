import { spawnSync } from 'node:child_process'
import { mkdirSync, readdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs'
import { join, resolve } from 'node:path'
import { describe, expect, it } from 'vitest'
import { scratchFolder } from '../commands/scratch.ts'

/** An empty project with the packed package in it and nothing else: whatever it needs must be inside. */
function projectWithPackage(): string {
  const project = scratchFolder()
  const modules = join(project, 'node_modules')
  mkdirSync(modules)
  // Without scripts, or packing would build again under the feet of other tests.
  const pack = ['pack', '--ignore-scripts', '--silent', '--pack-destination', project]
  const { stdout } = spawnSync('npm', pack, { encoding: 'utf8' })
  spawnSync('tar', ['-xzf', join(project, stdout.trim()), '-C', modules])
  renameSync(join(modules, 'package'), join(modules, 'ebbwatt'))
  writeFileSync(join(project, 'package.json'), '{"type": "module"}')
  return project
}

const consumer = `import { rank, type RankResult, readRecords, readStage, StudyRefusal, words } from 'ebbwatt'
import { readFileSync } from 'node:fs'
const demo = new URL('node_modules/ebbwatt/catalogs-demo/', import.meta.url)
const read = (path: string) => readFileSync(new URL(path, demo), 'utf8')
const stage = readStage(read('stages/quick-estimate.yaml'), 'stage').value
const records = ['rectifiers/alder-200v-16a.yaml', 'rectifiers/cedar-200v-20a.yaml'].flatMap((path) => readRecords(read(path), path).value ?? [])
if (stage === null) throw new Error('unreadable')
try {
  const settings = { seed: 1, draws: 50, version: '1', inputs: [] }
  const result: RankResult = words(rank({ ...stage.stage, candidates: null }, records, settings))
  console.log(result.candidates.map(({ id }) => id).sort().join(' '))
} catch (error) {
  if (error instanceof StudyRefusal) console.log(error.code)
  throw error
}
// @ts-expect-error a stage is no number
const wrong: number = stage
`

describe('the package as packed', () => {
  it('holds what it needs, runs as a command and as a typed library, and carries its licences', () => {
    const project = projectWithPackage()
    const folder = join(project, 'node_modules', 'ebbwatt')
    expect(readdirSync(folder).sort()).toEqual([
      'LICENSE',
      'README.md',
      'catalogs-demo',
      'dist',
      'package.json',
      'schemas',
    ])
    expect(readdirSync(join(folder, 'dist'))).not.toContain('build')
    const licences = readFileSync(join(folder, 'dist/THIRD-PARTY-LICENSES.txt'), 'utf8')
    for (const name of ['commander', 'mathjs', 'yaml', 'ajv', 'd3-scale', 'pure-rand']) {
      expect(licences).toMatch(new RegExp(`^${name} [\\d.]+ \\(`, 'm'))
    }
    writeFileSync(join(project, 'consumer.ts'), consumer)
    const options = ['--strict', '--module', 'nodenext', '--target', 'es2022', '--types', 'node', '--typeRoots']
    const compiled = spawnSync(
      resolve('node_modules/.bin/tsc'),
      [...options, resolve('node_modules/@types'), 'consumer.ts'],
      {
        cwd: project,
        encoding: 'utf8',
      },
    )
    expect(compiled.stdout).toBe('')
    const library = spawnSync('node', ['consumer.js'], { cwd: project, encoding: 'utf8' })
    expect(library).toMatchObject({ status: 0, stderr: '', stdout: 'alder-200v-16a cedar-200v-20a\n' })
    const { bin, version } = JSON.parse(readFileSync(join(folder, 'package.json'), 'utf8'))
    const command = spawnSync(join(folder, bin.ebbwatt), ['--version'], { encoding: 'utf8' })
    expect(command).toMatchObject({ status: 0, stdout: `${version}\n` })
  })
})

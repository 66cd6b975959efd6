import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs'
import type { Metafile } from 'esbuild'

/** Folders of the packages whose code went into a bundle, such as "node_modules/yaml". */
export function packagesOf(metafile: Metafile): readonly string[] {
  const packages = new Set<string>()
  for (const file of Object.keys(metafile.inputs)) {
    const folder = /^(.*node_modules\/(?:@[^/]+\/)?[^/]+)\//.exec(file)?.[1]
    if (folder !== undefined) packages.add(folder)
  }
  return [...packages]
}

/** Writes the licence texts that must travel with bundled code. */
export function writeLicences(packages: readonly string[]): void {
  const sections = [...new Set(packages)].sort().map(licenceSection)
  const head = 'ebbwatt contains code of the packages below, each under its own licence.\n'
  writeFileSync('dist/THIRD-PARTY-LICENSES.txt', [head, ...sections].join(`\n${'-'.repeat(79)}\n\n`))
}

function licenceSection(folder: string): string {
  const { name, version, license } = JSON.parse(readFileSync(`${folder}/package.json`, 'utf8'))
  const texts = readdirSync(folder)
    .filter((file) => /^(licen[cs]e|notice|copying)/i.test(file))
    .map((file) => readFileSync(`${folder}/${file}`, 'utf8').trim())
  if (texts.length === 0 && !existsSync(`${folder}/README.md`)) throw new Error(`${name} ships no licence text`)
  return `${name} ${version} (${license})\n\n${texts.join('\n\n')}\n`
}

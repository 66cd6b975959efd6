import { mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs'
import { Ajv2020 } from 'ajv/dist/2020.js'
import standaloneModule from 'ajv/dist/standalone/index.js'
import { build } from 'esbuild'
import { compile } from 'json-schema-to-typescript'
import { packagesOf } from './licences.ts'

const folder = 'dist/generated'

interface SchemaFile {
  /** File name without its ending, "stage" for stage.schema.json. */
  readonly name: string
  readonly schema: Readonly<Record<string, unknown>> & { readonly $id: string }
}

/**
 * Turns the schemas of the input files into checking functions and their types, importable as `#validators`.
 * Compiling a schema takes longer than reading a whole stage, so it is done here and not at every start.
 * Each function is a file of its own, so that a program carries only those it calls.
 * Returns the packages whose code the functions contain.
 */
export async function buildValidators(): Promise<readonly string[]> {
  const schemas = readSchemas()
  mkdirSync(folder, { recursive: true })
  writeFileSync(`${folder}/validators.d.ts`, declarationText(schemas))
  writeFileSync(`${folder}/validators.js`, schemas.map(({ name }) => `export * from './${name}.js'\n`).join(''))
  const packages = await Promise.all(schemas.map(buildValidator))
  return packages.flat()
}

async function buildValidator(file: SchemaFile): Promise<readonly string[]> {
  await writeTypes(file)
  return bundleValidator(file, validatorSource(file))
}

/** The schema of results is for readers of results; nothing here checks one at run time. */
function readSchemas(): readonly SchemaFile[] {
  return readdirSync('schemas')
    .filter((file) => file.endsWith('.schema.json') && file !== 'result.schema.json')
    .sort()
    .map((file) => {
      const schema = JSON.parse(readFileSync(`schemas/${file}`, 'utf8'))
      return { name: file.replace('.schema.json', ''), schema: { ...schema, $id: schema.$id ?? file } }
    })
}

/** Own keywords begin with `x-` (units, wording for editors); strict mode has to be told their names. */
function ownKeywords(value: unknown, found = new Set<string>()): Set<string> {
  if (typeof value !== 'object' || value === null) return found
  for (const [key, child] of Object.entries(value)) {
    if (key.startsWith('x-')) found.add(key)
    else ownKeywords(child, found)
  }
  return found
}

function validatorSource({ name, schema }: SchemaFile): string {
  const ajv = new Ajv2020({
    strict: true,
    strictRequired: false,
    allErrors: true,
    ownProperties: true,
    verbose: true,
    // A definition used in many places is one function, not as many copies: a third of the code to load.
    inlineRefs: false,
    allowUnionTypes: true,
    code: { source: true, esm: true },
  })
  for (const keyword of ownKeywords(schema)) ajv.addKeyword(keyword)
  ajv.addSchema(schema)
  // The package is CommonJS: Node hands over its exports object, whose `default` is the function.
  const standaloneCode = standaloneModule.default
  return standaloneCode(ajv, { [functionName(name)]: schema.$id })
}

/** The generated code asks for helpers of ajv with `require`, which plain ESM has not; bundling puts them in. */
async function bundleValidator({ name }: SchemaFile, contents: string): Promise<readonly string[]> {
  const { metafile } = await build({
    stdin: { contents, resolveDir: '.', loader: 'js' },
    bundle: true,
    format: 'esm',
    platform: 'neutral',
    mainFields: ['main'],
    target: 'es2022',
    metafile: true,
    outfile: `${folder}/${name}.js`,
  })
  return packagesOf(metafile)
}

async function writeTypes({ name, schema }: SchemaFile): Promise<void> {
  const { $id: _, ...rest } = schema
  const text = await compile({ ...rest, title: typeName(name) }, typeName(name), {
    cwd: 'schemas',
    additionalProperties: false,
    format: false,
    bannerComment: '',
  })
  writeFileSync(`${folder}/${name}.d.ts`, text)
}

function declarationText(schemas: readonly SchemaFile[]): string {
  const imports = schemas.map(({ name }) => `import type { ${typeName(name)} } from './${name}.d.ts'`)
  const functions = schemas.map(
    ({ name }) => `export declare const ${functionName(name)}: Validator<${typeName(name)}>`,
  )
  return [
    ...imports,
    validatorType,
    ...functions,
    `export type { ${schemas.map((s) => typeName(s.name)).join(', ')} }`,
    '',
  ].join('\n')
}

const validatorType = `
/** One broken rule: where in the data, which keyword of the schema, and what that keyword asked for. */
export interface SchemaError {
  readonly keyword: string
  readonly instancePath: string
  readonly schemaPath: string
  readonly params: Readonly<Record<string, unknown>>
  readonly message?: string
  readonly schema?: unknown
  readonly parentSchema?: Readonly<Record<string, unknown>>
  readonly data?: unknown
}
/** Checks a value; \`errors\` holds what the last call found, null when it found nothing. */
export interface Validator<T> {
  (value: unknown): value is T
  errors: readonly SchemaError[] | null
}`

function pascal(name: string): string {
  return name.replace(/(^|-)([a-z])/g, (_match, _dash, letter: string) => letter.toUpperCase())
}
function typeName(name: string): string {
  return `${pascal(name)}Schema`
}
function functionName(name: string): string {
  return `validate${pascal(name)}`
}

import type { ShapeFault } from './shape-fault.ts'
import { commaHint } from './units/parse-quantity.ts'
import type { Path } from './yaml/path.ts'

/** "{resistance: 0,5 ohm}" reads as a bare 0 and a second key "5 ohm": both are told as the one decimal comma. */
export function mergeCommas(data: unknown, faults: readonly ShapeFault[]): readonly ShapeFault[] {
  const merged = new Map<ShapeFault, ShapeFault | null>()
  for (const fault of faults) {
    if (fault.code !== 'key-unknown' || !/^\d/.test(fault.found)) continue
    const bare = bareNumberBefore(data, fault, faults)
    if (bare === undefined) continue
    const found = `${bare.found},${fault.found}`
    merged.set(bare, { ...bare, code: 'number-decimal-comma', found, hint: commaHint })
    merged.set(fault, null)
  }
  return faults.flatMap((fault) => {
    const replaced = merged.get(fault)
    if (replaced === undefined) return [fault]
    return replaced === null ? [] : [replaced]
  })
}

function bareNumberBefore(data: unknown, { at }: ShapeFault, faults: readonly ShapeFault[]): ShapeFault | undefined {
  const parent = at.slice(0, -1)
  const keys = Object.keys((valueAt(data, parent) as object | null) ?? {})
  const before = keys[keys.indexOf(String(at.at(-1))) - 1]
  if (before === undefined) return undefined
  return faults.find(({ code, path }) => code === 'unit-missing' && isSame(path, [...parent, before]))
}

function valueAt(data: unknown, path: Path): unknown {
  return path.reduce<unknown>(
    (value, step) =>
      typeof value === 'object' && value !== null ? (value as Readonly<Record<string, unknown>>)[step] : undefined,
    data,
  )
}

function isSame(one: Path, other: Path): boolean {
  return one.length === other.length && one.every((step, index) => step === other[index])
}

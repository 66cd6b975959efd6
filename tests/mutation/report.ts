import { existsSync, readFileSync } from 'node:fs'
import { parse } from 'yaml'
import type { Tried } from './run-campaign.ts'

export interface Score {
  readonly folder: string
  readonly noticed: number
  readonly missed: number
  /** Missed faults that no entry of `survivors/FOLDER.yaml` gives a reason for, as that file would write them. */
  readonly unexplained: readonly string[]
  /** Entries of that file for faults that are noticed, or are no longer there. */
  readonly outdated: readonly string[]
}

/** One reason for faults that no test notices, in `survivors/FOLDER.yaml`. */
interface Explanation {
  readonly file: string
  readonly reason: string
  readonly faults: readonly string[]
}

/** A fault in what runs once while files load cannot be woken, so it counts on neither side. */
export function scoreOf(folder: string, tried: readonly Tried[]): Score {
  const noticed = tried.filter(({ outcome }) => ['noticed', 'spoilt', 'endless'].includes(outcome))
  const missed = tried.filter(({ outcome }) => outcome === 'missed' || outcome === 'unreached').map(faultText)
  const known = explained(folder)
  return {
    folder,
    noticed: noticed.length,
    missed: missed.length,
    unexplained: missed.filter((text) => !known.includes(text)),
    outdated: known.filter((text) => !missed.includes(text)),
  }
}

export function lineOf({ folder, noticed, missed, unexplained }: Score): string {
  const all = noticed + missed
  const share = ((100 * noticed) / Math.max(1, all)).toFixed(1)
  return `${folder.padEnd(9)} ${share} %: ${noticed} of ${all} faults noticed, ${unexplained.length} missed without a reason\n`
}

/** "src/FILE: what stands there -> what the fault puts in its place", on one line. */
function faultText({ file, start, end, replacement }: Tried): string {
  const lines = readFileSync(file, 'utf8')
    .split('\n')
    .slice(start.line, end.line + 1)
  const last = lines.length - 1
  lines[last] = lines[last]!.slice(0, end.column)
  lines[0] = lines[0]!.slice(start.column)
  return `${file}: ${oneLine(lines.join(' '))} -> ${oneLine(replacement)}`
}

function oneLine(text: string): string {
  return text.replace(/\s+/g, ' ').trim()
}

function explained(folder: string): readonly string[] {
  const path = `tests/mutation/survivors/${folder}.yaml`
  const entries: readonly Explanation[] = existsSync(path) ? parse(readFileSync(path, 'utf8')) : []
  return entries.flatMap(({ file, faults }) => faults.map((fault) => `${file}: ${fault}`))
}

import { fork } from 'node:child_process'
import { resolve } from 'node:path'
import { bundleProgram, bundleWithFaults, type Fault } from './bundle-with-faults.ts'
import type { Campaign } from './campaigns.ts'
import type { End, Report } from './try-faults.ts'

export interface Tried extends Fault {
  readonly outcome: End
}

/** Longer than any test of a campaign takes, on a busy machine as well. [ms] */
const patience = 10_000
const processes = 2
const program = resolve('dist/build/tools/try-faults.js')

/** Tries every fault of a folder. */
export async function runCampaign(name: string, campaign: Campaign): Promise<readonly Tried[]> {
  const bundle = resolve(`dist/build/tools/faults-${name}.js`)
  await bundleProgram(program)
  const faults = await bundleWithFaults(campaign, bundle)
  const words = [bundle, ...(campaign.anew ? ['anew'] : [])]
  const ends = new Map<string, End>()
  const share = (first: number): string[] =>
    faults.filter((_, index) => index % processes === first).map(({ id }) => id)
  await Promise.all(Array.from({ length: processes }, (_, first) => tryAll(words, share(first), ends)))
  return faults.map((fault) => ({ ...fault, outcome: ends.get(fault.id)! }))
}

/** A fault that never ends takes its process with it, and so does one that spoils it: the others go on in a new one. */
async function tryAll(words: readonly string[], ids: readonly string[], ends: Map<string, End>): Promise<void> {
  let left = ids
  while (left.length > 0) {
    await tryUntilSpoilt(words, left, ends)
    const before = left.length
    left = left.filter((id) => !ends.has(id))
    if (left.length === before) throw new Error(`the process that tries faults got nowhere: ${words[0]}`)
  }
}

function tryUntilSpoilt(words: readonly string[], ids: readonly string[], ends: Map<string, End>): Promise<void> {
  return new Promise((done) => {
    const child = fork(program, [...words])
    let timer: NodeJS.Timeout | undefined
    child.on('message', ({ id, end }: Report) => {
      clearTimeout(timer)
      if (end === 'begun') {
        timer = setTimeout(() => {
          ends.set(id, 'endless')
          child.kill('SIGKILL')
        }, patience)
        return
      }
      ends.set(id, end)
      if (end === 'spoilt') child.kill('SIGKILL')
    })
    child.on('exit', () => {
      clearTimeout(timer)
      done()
    })
    child.send(ids)
  })
}

/**
 * How many deliberate faults in the core the tests notice, folder by folder: `npm run mutation -- [FOLDER]...`.
 * Faults tried before against the same code and tests are remembered in coverage/; `--report` only reads what is there.
 */
import { spawnSync } from 'node:child_process'
import { campaigns } from './campaigns.ts'
import { type Score, scoreOf } from './report.ts'

const asked = process.argv.slice(2).filter((word) => word !== '--report')
const folders = asked.length === 0 ? Object.keys(campaigns) : asked
const unknown = folders.filter((folder) => !(folder in campaigns))
if (unknown.length > 0)
  throw new Error(`unknown: ${unknown.join(', ')}; there are ${Object.keys(campaigns).join(', ')}`)
if (!process.argv.includes('--report')) for (const folder of folders) campaign(folder)

const scores = folders.map(scoreOf)
const unexplained = scores.flatMap((score) => score.unexplained)
for (const fault of unexplained) process.stdout.write(`missed and not explained: ${fault}\n`)
for (const score of scores) process.stdout.write(lineOf(score))
const sum = (key: 'noticed' | 'missed'): number => scores.reduce((total, score) => total + score[key], 0)
process.stdout.write(lineOf({ folder: 'all', noticed: sum('noticed'), missed: sum('missed'), unexplained }))

function campaign(folder: string): void {
  const { status } = spawnSync('node_modules/.bin/stryker', ['run', '.stryker.conf.mjs'], {
    stdio: 'inherit',
    env: { ...process.env, EBBWATT_MUTATED: folder },
  })
  if (status !== 0) throw new Error(`the campaign in ${folder} ended with ${status}`)
}

function lineOf({ folder, noticed, missed, unexplained }: Score): string {
  const all = noticed + missed
  const share = ((100 * noticed) / Math.max(1, all)).toFixed(1)
  return `${folder.padEnd(9)} ${share} %: ${noticed} of ${all} faults noticed, ${unexplained.length} missed without a reason\n`
}

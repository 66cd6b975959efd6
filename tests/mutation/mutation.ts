/**
 * How many deliberate faults in the core the tests beside it notice: `npm run mutation -- [FOLDER]...`. The faults are
 * Stryker's; they are tried in processes that have all tests loaded, which takes minutes where starting a runner of
 * tests for each takes hours.
 */
import { campaigns } from './campaigns.ts'
import { lineOf, type Score, scoreOf } from './report.ts'
import { runCampaign } from './run-campaign.ts'

const asked = process.argv.slice(2)
const folders = asked.length === 0 ? Object.keys(campaigns) : asked
const unknown = folders.filter((folder) => !(folder in campaigns))
if (unknown.length > 0)
  throw new Error(`unknown: ${unknown.join(', ')}; there are ${Object.keys(campaigns).join(', ')}`)

const scores: Score[] = []
for (const folder of folders) {
  const score = scoreOf(folder, await runCampaign(folder, campaigns[folder]!))
  for (const fault of score.unexplained) process.stdout.write(`missed and not explained: ${fault}\n`)
  for (const fault of score.outdated) process.stdout.write(`explained, but not missed: ${fault}\n`)
  process.stdout.write(lineOf(score))
  scores.push(score)
}
const sum = (key: 'noticed' | 'missed'): number => scores.reduce((total, score) => total + score[key], 0)
const all = { unexplained: scores.flatMap((each) => each.unexplained), outdated: [] }
process.stdout.write(lineOf({ folder: 'all', noticed: sum('noticed'), missed: sum('missed'), ...all }))
process.exitCode = all.unexplained.length === 0 ? 0 : 1

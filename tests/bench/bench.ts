/** `npm run bench [-- --json]`: how fast the inner loop, the draws, a whole ranking and the start of the command are. */
import { type CReference, compileReference, runReference } from './c-reference.ts'
import { candidatesOf, loadDemo } from './demo.ts'
import { measureDraws, rankCandidates, rankDraws } from './draws.ts'
import { meanJunction, settlePoints } from './points.ts'
import { measureStartUp } from './start-up.ts'
import { median, ratePerSecond, referenceLoop, referenceSink } from './timing.ts'

const boost = loadDemo('pump-boost')
const mains = loadDemo('cold-store-mains')
const boostCandidates = candidatesOf(boost)
const mainsCandidates = candidatesOf(mains)

// Our points and those of C take turns, so that what else the machine does hits both.
const inC: CReference[] = []
const ours: number[] = []
const hasCompiler = compileReference()
settlePoints(boostCandidates)
for (let round = 0; round < 7; round++) {
  ours.push(ratePerSecond(() => settlePoints(boostCandidates), 2, 0.1))
  if (hasCompiler) inC.push(runReference(boostCandidates, 0.2))
}
const perC = inC.map(({ pointsPerSecond }, round) => ours[round]! / pointsPerSecond)
const reference = ratePerSecond(referenceLoop)
const mainsPoints = ratePerSecond(() => settlePoints(mainsCandidates), 5)
const dcDraws = measureDraws(boost)
const mainsDraws = measureDraws(mains)
const startUp = measureStartUp(startUpRounds())

const figures = {
  node: process.version,
  reference_loop_per_second: reference,
  candidate_points_per_second: median(ours),
  candidate_points_in_c_per_second: hasCompiler ? median(inC.map((each) => each.pointsPerSecond)) : null,
  candidate_points_to_c: hasCompiler ? median(perC) : null,
  mean_junction_difference_to_c_k: hasCompiler ? meanJunction(boostCandidates) - inC[0]!.meanJunction : null,
  mains_points_per_second: mainsPoints,
  draws_per_second: { dc: dcDraws.drawsPerSecond, mains: mainsDraws.drawsPerSecond },
  rank_seconds: {
    candidates: rankCandidates,
    draws: rankDraws,
    dc: { draws: dcDraws.withDoubt, whole: dcDraws.whole },
    mains: { draws: mainsDraws.withDoubt, whole: mainsDraws.whole },
  },
  start_up: startUp.map(({ command, seconds, timesBare }) => ({ command, seconds, times_bare_node: timesBare })),
}
if (!Number.isFinite(referenceSink())) throw new Error('the reference loop left the numbers')

process.stdout.write(process.argv.includes('--json') ? `${JSON.stringify(figures, null, 2)}\n` : table())

/** As many rounds, up to nine, as fit into some eight seconds on this machine as it is loaded now. */
function startUpRounds(): number {
  const begun = performance.now()
  measureStartUp(1)
  const perRound = (performance.now() - begun) / 2e3
  return Math.min(Math.max(Math.floor(8 / perRound), 1), 9)
}

function table(): string {
  const perSecond = (value: number): string => `${Math.round(value).toLocaleString('en')}/s`
  const milliseconds = (value: number): string => `${(value * 1e3).toFixed(0)} ms`
  const whole = `${rankCandidates} candidates, ${rankDraws} draws each`
  const rows: [string, string][] = [
    ['fixed arithmetic loop', perSecond(figures.reference_loop_per_second)],
    ['boost candidate points', perSecond(figures.candidate_points_per_second)],
    ['mains candidate points', perSecond(figures.mains_points_per_second)],
    ['draws, dc', perSecond(figures.draws_per_second.dc)],
    ['draws, mains', perSecond(figures.draws_per_second.mains)],
    [`doubt of a dc ranking (${whole})`, milliseconds(dcDraws.withDoubt)],
    [`doubt of a mains ranking (${whole})`, milliseconds(mainsDraws.withDoubt)],
    ['whole dc ranking', milliseconds(dcDraws.whole)],
    ['whole mains ranking', milliseconds(mainsDraws.whole)],
    ...startUp.map(({ command, seconds, timesBare }): [string, string] => [
      command,
      `${milliseconds(seconds)}, ${timesBare.toFixed(2)} times bare node`,
    ]),
  ]
  if (hasCompiler) {
    const { candidate_points_in_c_per_second: c, candidate_points_to_c: ratio } = figures
    rows.splice(2, 0, ['the same in C at -O2', `${perSecond(c!)}; ours is ${ratio!.toFixed(2)} times that`])
  }
  const width = Math.max(...rows.map(([name]) => name.length))
  return `${rows.map(([name, value]) => `${name.padEnd(width)}  ${value}`).join('\n')}\n`
}

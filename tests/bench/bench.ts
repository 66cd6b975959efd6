/** `npm run bench`: what the program costs in time on this machine; `--json` prints one document. */
import { measureStartUp } from './start-up.ts'

const rounds = 11

const startUp = measureStartUp(rounds)
if (process.argv.includes('--json')) {
  const start_up = startUp.map(({ command, seconds, timesBare }) => ({ command, seconds, times_bare_node: timesBare }))
  console.log(JSON.stringify({ node: process.version, rounds, start_up }, null, 2))
} else {
  console.log(`start-up, median of ${rounds} rounds, beside a bare node of the same round`)
  for (const { command, seconds, timesBare } of startUp) {
    console.log(`  ${command.padEnd(32)} ${(seconds * 1000).toFixed(0).padStart(5)} ms  ${timesBare.toFixed(2)} x`)
  }
}

/** Processor time of this process so far: what other programs do on the machine hardly enters it. [s] */
function processorSeconds(): number {
  const { user, system } = process.cpuUsage()
  return (user + system) / 1e6
}

/** Median rate of `work`, called until each of the rounds has lasted long enough; the first round only warms up. */
export function ratePerSecond(work: () => number, rounds = 7, seconds = 0.12): number {
  return median(Array.from({ length: rounds + 1 }, () => rateOf(work, seconds)).slice(1))
}

function rateOf(work: () => number, seconds: number): number {
  const begun = processorSeconds()
  let done = 0
  let elapsed = 0
  while (elapsed < seconds) {
    done += work()
    elapsed = processorSeconds() - begun
  }
  return done / elapsed
}

/** Median processor time of `work` after warm-up; a slow machine gets fewer rounds, so that the bench ends in a minute. [s] */
export function medianSeconds(work: () => void, rounds = 5, patience = 3): number {
  work()
  const begun = performance.now()
  const times: number[] = []
  while (times.length === 0 || (times.length < rounds && performance.now() - begun < patience * 1e3)) {
    const before = processorSeconds()
    work()
    times.push(processorSeconds() - before)
  }
  return median(times)
}

export function median(values: readonly number[]): number {
  const sorted = values.toSorted((a, b) => a - b)
  return (sorted[(sorted.length - 1) >> 1]! + sorted[sorted.length >> 1]!) / 2
}

let sink = 0

/** A fixed arithmetic kernel: what this machine does in a second, so that figures compare across machines. */
export function referenceLoop(): number {
  const passes = 20_000
  let x = 1.1
  for (let k = 0; k < passes; k++) {
    x = x * 1.0000001 + 1e-9
    sink += Math.sqrt(x) / (1 + x * x) + Math.log(x) + Math.exp(-x)
  }
  return passes
}

/** Uses the sum, so that no compiler may leave the loop out. */
export function referenceSink(): number {
  return sink
}

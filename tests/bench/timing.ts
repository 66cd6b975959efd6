/** Median rate of `work`, called until each of the rounds has lasted long enough; the first round only warms up. */
export function ratePerSecond(work: () => number, rounds = 9, seconds = 0.12): number {
  return median(Array.from({ length: rounds + 1 }, () => rateOf(work, seconds)).slice(1))
}

function rateOf(work: () => number, seconds: number): number {
  const begun = performance.now()
  let done = 0
  let elapsed = 0
  while (elapsed < seconds) {
    done += work()
    elapsed = (performance.now() - begun) / 1e3
  }
  return done / elapsed
}

/** Median time of `work` after warm-up. [s] */
export function medianSeconds(work: () => void, rounds = 5): number {
  const times = Array.from({ length: rounds + 1 }, () => {
    const begun = performance.now()
    work()
    return (performance.now() - begun) / 1e3
  })
  return median(times.slice(1))
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

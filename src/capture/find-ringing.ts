/** A ringing found in what the fit leaves. */
export interface FoundRinging {
  /** [Hz] */
  readonly frequency: number
  /** Mean amplitude over the stretch looked at. [A] */
  readonly amplitude: number
}

/** Frequencies tried between three cycles in the stretch and a fifth of the sampling rate. */
const tries = 160
const samplesAtMost = 1500

/**
 * Looks for an oscillation in residuals by their periodogram (A. Schuster, 1898, from memory) on a logarithmic grid.
 * Noise spreads evenly over frequency, a misfit of the tail sits below three cycles: a line of its own is a ringing
 * when it stands six times above the median of the grid and above `least`.
 */
export function findRinging(residuals: Float64Array, interval: number, least: number): FoundRinging | null {
  const stride = Math.max(1, Math.floor(residuals.length / samplesAtMost))
  const values = everyMean(residuals, stride)
  const step = interval * stride
  const lowest = 3 / (values.length * step)
  const highest = 0.2 / step
  if (values.length < 30) return null
  const amplitudes = new Float64Array(tries)
  let best = 0
  for (let j = 0; j < tries; j++) {
    amplitudes[j] = amplitudeAt(values, 2 * Math.PI * step * frequencyOf(j, lowest, highest))
    if (amplitudes[j]! > amplitudes[best]!) best = j
  }
  const amplitude = amplitudes[best]!
  const median = amplitudes.slice().sort()[Math.floor(tries / 2)]!
  // the lowest lines belong to the tail's shape
  const own = best > 2 && amplitude > least && amplitude > 4 * Math.max(median, whiteLevel(values))
  return own ? { frequency: frequencyOf(best, lowest, highest), amplitude } : null
}

function frequencyOf(j: number, lowest: number, highest: number): number {
  return lowest * (highest / lowest) ** (j / (tries - 1))
}

function everyMean(values: Float64Array, stride: number): Float64Array {
  return Float64Array.from({ length: Math.floor(values.length / stride) }, (_, k) => {
    let sum = 0
    for (let j = 0; j < stride; j++) sum += values[k * stride + j]!
    return sum / stride
  })
}

function amplitudeAt(values: Float64Array, phase: number): number {
  let cosine = 0
  let sine = 0
  for (let k = 0; k < values.length; k++) {
    cosine += values[k]! * Math.cos(phase * k)
    sine += values[k]! * Math.sin(phase * k)
  }
  return (2 / values.length) * Math.hypot(cosine, sine)
}

/** Amplitude that white noise of the samples' differences would show in one line. */
function whiteLevel(values: Float64Array): number {
  let sum = 0
  for (let k = 1; k < values.length; k++) sum += (values[k]! - values[k - 1]!) ** 2
  return Math.sqrt(sum / (values.length - 1) / 2) * Math.sqrt(2 / values.length)
}

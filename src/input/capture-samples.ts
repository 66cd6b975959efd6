/** Samples while they come in: columns of doubles in blocks, so that growing copies nothing. */
export interface SampleStore {
  readonly add: (time: number, current: number, voltage: number) => void
  readonly count: () => number
  /** One stretch of a column as an array of its own; null for a column that is not kept. */
  readonly column: (name: 'time' | 'current' | 'voltage', from: number, to: number) => Float64Array | null
}

const blockLength = 262_144

/** Keeps the current always, time and voltage where they are columns of the file. */
export function sampleStore(kept: { readonly time: boolean; readonly voltage: boolean }): SampleStore {
  const blocks = { time: [] as Float64Array[], current: [] as Float64Array[], voltage: [] as Float64Array[] }
  const has = { time: kept.time, current: true, voltage: kept.voltage }
  let count = 0
  let place = blockLength
  const add = (time: number, current: number, voltage: number) => {
    if (place === blockLength) {
      for (const name of names) if (has[name]) blocks[name].push(new Float64Array(blockLength))
      place = 0
    }
    const last = blocks.current.length - 1
    blocks.current[last]![place] = current
    if (has.time) blocks.time[last]![place] = time
    if (has.voltage) blocks.voltage[last]![place] = voltage
    place += 1
    count += 1
  }
  const column = (name: (typeof names)[number], from: number, to: number) => {
    if (!has[name]) return null
    const out = new Float64Array(to - from)
    for (let k = from; k < to; ) {
      const block = blocks[name][Math.floor(k / blockLength)]!
      const begin = k % blockLength
      const length = Math.min(blockLength - begin, to - k)
      out.set(block.subarray(begin, begin + length), k - from)
      k += length
    }
    return out
  }
  return { add, count: () => count, column }
}

const names = ['time', 'current', 'voltage'] as const

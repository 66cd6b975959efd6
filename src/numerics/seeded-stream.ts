import { xoroshiro128plusFromState } from 'pure-rand/generator/xoroshiro128plus'

/** A reproducible sequence of random numbers; drawing from it advances it. */
export interface SeededStream {
  /** Uniform in the open interval (0, 1), 53 bits: a normal quantile of it is always finite. */
  readonly uniform: () => number
  /** Uniform whole number in 0 ... limit − 1; limit up to 2^32. */
  readonly below: (limit: number) => number
}

const lower64 = (value: bigint): bigint => BigInt.asUintN(64, value)

/**
 * A random stream that depends on its keys alone: the same keys give the same numbers, other keys unrelated ones.
 *
 * The keys are hashed by 64-bit FNV-1a over type, length and characters (so ("ab", "c") and ("a", "bc"), or 1 and "1",
 * differ), and SplitMix64 expands the hash to the 128 bits of state. The generator's own one-number seeding is not
 * used: its first values are close to 1 for every small seed.
 *
 * @throws Never.
 * @see G. Fowler, L. C. Noll, K.-P. Vo, D. Eastlake, The FNV Non-Cryptographic Hash Algorithm (FNV-1a, 64 bit).
 * @see G. L. Steele, D. Lea, C. H. Flood, Fast splittable pseudorandom number generators, OOPSLA 2014 (SplitMix64).
 * @see D. Blackman, S. Vigna, Scrambled linear pseudorandom number generators, 2018 (xoroshiro128+).
 */
export function seededStream(...keys: readonly (string | number)[]): SeededStream {
  const state: number[] = []
  let counter = hashText(keys.map(keyText).join(''))
  for (let word = 0; word < 2; word++) {
    counter = lower64(counter + 0x9e3779b97f4a7c15n)
    const mixed = mixBits(counter)
    state.push(Number(mixed >> 32n) | 0, Number(mixed & 0xffffffffn) | 0)
  }
  const generator = xoroshiro128plusFromState(state)
  return {
    // The lowest bits of this generator are its weakest: they are the ones shifted out.
    uniform: () => ((generator.next() >>> 5) * 0x4000000 + (generator.next() >>> 6) + 0.5) / 0x20000000000000,
    below: (limit) => Math.floor(((generator.next() >>> 0) / 0x100000000) * limit),
  }
}

function keyText(key: string | number): string {
  const text = String(key)
  return `${typeof key === 'number' ? 'n' : 't'}${text.length}:${text}`
}

/** 64-bit FNV-1a over the two bytes of each UTF-16 unit, high byte first and left out where it is zero. */
export function hashText(text: string): bigint {
  let hash = 0xcbf29ce484222325n
  for (let index = 0; index < text.length; index++) {
    const unit = text.charCodeAt(index)
    if (unit > 0xff) hash = lower64((hash ^ BigInt(unit >> 8)) * 0x100000001b3n)
    hash = lower64((hash ^ BigInt(unit & 0xff)) * 0x100000001b3n)
  }
  return hash
}

/** The output function of SplitMix64. */
export function mixBits(counter: bigint): bigint {
  let mixed = lower64((counter ^ (counter >> 30n)) * 0xbf58476d1ce4e5b9n)
  mixed = lower64((mixed ^ (mixed >> 27n)) * 0x94d049bb133111ebn)
  return mixed ^ (mixed >> 31n)
}

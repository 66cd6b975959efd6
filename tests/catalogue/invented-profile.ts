import { seededStream } from '../../src/numerics/seeded-stream.ts'

/** What a profile swings between: ambient in degC; input in volts, of a battery or the mains. */
export interface ProfileSwing {
  readonly ambient: readonly [number, number]
  readonly input: readonly [number, number]
}

/**
 * An invented duty profile of quarter-hours, the same for the same seed: a pump that works by day and more in summer, in
 * surroundings that are warmer by day and in summer, from an input that sags under load. `hours` is what each row stands for.
 */
export function inventedProfile(rows: number, hours: number, seed: number, { ambient, input }: ProfileSwing): string {
  const { uniform } = seededStream(seed, 'profile')
  const between = ([low, high]: readonly [number, number], share: number): number => low + (high - low) * share
  const lines = Array.from({ length: rows }, (_, row) => {
    const day = (1 - Math.cos((2 * Math.PI * row) / 96)) / 2
    const year = (1 - Math.cos((2 * Math.PI * row) / rows)) / 2
    const load = Math.round(5 + 90 * day * (0.3 + 0.7 * year) + 5 * uniform())
    const warm = between(ambient, 0.45 * day + 0.5 * year + 0.05 * uniform())
    const volts = between(input, 0.8 - 0.007 * load + 0.2 * uniform())
    return `${hours},${load},${warm.toFixed(1)},${volts.toFixed(1)}`
  })
  return `hours [h],load [%],ambient [degC],input [V]\n${lines.join('\n')}\n`
}

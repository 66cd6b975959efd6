import { figureText } from './figure-text.ts'
import { invertPair, type RampFigures, type RecoveryPoint } from './invert-pair.ts'
import type { FigureName, RampReading } from './recovery-figures.ts'
import type { ExpectedPoint } from './single-figure.ts'

/** Which figures of a row are used. */
export interface ChosenFigures {
  readonly names: readonly FigureName[]
  /** (u, y) from each pair of them; empty for a single figure. */
  readonly starts: readonly RecoveryPoint[]
  /** The first impossible pair, in words; null when all figures can belong to one event. */
  readonly impossible: { readonly found: string; readonly bound: string } | null
}

/** What a row keeps when no pair of it is possible. */
const keepOrder: readonly FigureName[] = ['charge', 'peakReverseCurrent', 'recoveryTime', 'softness']

/**
 * The largest set of figures whose pairs are all possible. Where leaving out one or another would do, the set nearest to
 * what the class shows is kept: the other figure is the culprit. With no possible pair the charge stays (else the peak).
 */
export function chooseFigures(
  reading: RampReading,
  figures: RampFigures,
  given: readonly FigureName[],
  expected: ExpectedPoint,
): ChosenFigures {
  const all = pairPoints(reading, figures, given)
  if (Array.isArray(all)) return { names: given, starts: all, impossible: null }
  const impossible = bounds(reading, figures, all.first, all.second)
  for (let size = given.length - 1; size >= 2; size--) {
    let best: ChosenFigures | null = null
    let least = Number.POSITIVE_INFINITY
    for (const names of subsets(given, size)) {
      const starts = pairPoints(reading, figures, names)
      if (!Array.isArray(starts)) continue
      const distance = Math.min(...starts.map((point) => distanceFrom(expected, point)))
      if (distance < least) {
        least = distance
        best = { names, starts, impossible }
      }
    }
    if (best !== null) return best
  }
  return { names: keepOrder.filter((name) => given.includes(name)).slice(0, 1), starts: [], impossible }
}

/** (u, y) of every pair, or the first pair that is impossible. */
function pairPoints(
  reading: RampReading,
  figures: RampFigures,
  names: readonly FigureName[],
): RecoveryPoint[] | { readonly first: FigureName; readonly second: FigureName } {
  const points: RecoveryPoint[] = []
  for (let i = 0; i < names.length; i++) {
    for (let j = i + 1; j < names.length; j++) {
      const point = invertPair(reading, figures, names[i]!, names[j]!)
      if (point === null) return { first: names[i]!, second: names[j]! }
      points.push(point)
    }
  }
  return points
}

function subsets(names: readonly FigureName[], size: number): FigureName[][] {
  if (size === 0) return [[]]
  return names.flatMap((name, index) => subsets(names.slice(index + 1), size - 1).map((rest) => [name, ...rest]))
}

function distanceFrom(expected: ExpectedPoint, point: RecoveryPoint): number {
  return (
    (point.lifetime - expected.lifetime) ** 2 / expected.lifetimeVariance +
    (point.ratio - expected.ratio) ** 2 / expected.ratioVariance
  )
}

/** Both numbers of an impossible pair: what was found, and the bound that the other figure sets. */
function bounds(
  reading: RampReading,
  figures: RampFigures,
  first: FigureName,
  second: FigureName,
): ChosenFigures['impossible'] {
  const { peakReverseCurrent: peak, recoveryTime: time, charge } = figures
  const has = (name: FigureName) => first === name || second === name
  const until = reading.recoveryTimeBy.kind === 'level' ? reading.recoveryTimeBy.until : 0
  if (has('peakReverseCurrent') && until >= peak!)
    return { found: figureText('I_RM', peak!, 'A'), bound: figureText('the level', until, 'A') }
  // the peak is no lower than the level at which trr ends, and comes no sooner
  const lowest = has('peakReverseCurrent') ? peak! : until
  const shortest = lowest / reading.slope
  if (has('charge') && !(has('recoveryTime') && time! <= shortest)) {
    const limit = has('recoveryTime') ? reading.slope * time! ** 2 : lowest * shortest
    return { found: figureText('Qrr', charge!, 'C'), bound: figureText('Qrr', limit / 2, 'C') }
  }
  return { found: figureText('trr', time ?? 0, 's'), bound: figureText('trr', shortest, 's') }
}

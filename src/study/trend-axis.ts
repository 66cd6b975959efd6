import type { TrendRequest } from '../domain/study.ts'
import { StudyRefusal } from '../domain/study-refusal.ts'

/** Positions along the axis, both ends included, evenly spaced or evenly in the logarithm. */
export function axisValues({ over, from, to, steps, logarithmic }: TrendRequest): number[] {
  if (!(from < to)) {
    throw new StudyRefusal('range-reversed', {
      path: over,
      found: 'a range that does not rise',
      expected: '--from below --to',
      hint: 'exchange the two ends',
    })
  }
  if (logarithmic && !(from > 0)) {
    throw new StudyRefusal('range-outside', {
      path: over,
      found: 'a logarithmic axis from zero or below',
      expected: 'a start above zero',
      hint: 'leave --log out or start above zero',
    })
  }
  const last = steps - 1
  return Array.from({ length: steps }, (_, k) => {
    // The ends are taken as given, so that they are met exactly.
    if (k === 0) return from
    if (k === last) return to
    return logarithmic ? from * (to / from) ** (k / last) : from + ((to - from) * k) / last
  })
}

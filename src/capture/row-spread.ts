/**
 * Reading error of the grade "measured": probe, shunt and oscilloscope gain, which no repetition shows.
 * The row's spread replaces the grade's own figure, so it must not fall below it.
 */
const gainDoubt = 0.03

/** One relative figure for a row: the largest of its figures' doubts, gain included, in tenths of a percent. */
export function rowSpread(doubts: readonly number[]): number {
  return Math.ceil(1000 * Math.hypot(gainDoubt, Math.max(0, ...doubts))) / 1000
}

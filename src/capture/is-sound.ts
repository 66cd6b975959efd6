/** Every figure is a number above zero: anything else is a fit that has lost the event. */
export function allPositive(values: readonly number[]): boolean {
  return values.every((value) => Number.isFinite(value) && value > 0)
}

/** A doubt that could not be had is one of 100 %. */
export function knownDoubts(spread: Readonly<Record<string, number>>): Readonly<Record<string, number>> {
  return Object.fromEntries(
    Object.entries(spread).map(([name, value]) => [name, Number.isFinite(value) ? Math.min(1, value) : 1]),
  )
}

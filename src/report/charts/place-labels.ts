/**
 * Heights of labels that want to stand at `wanted` but need `step` between them: moved apart, order kept, inside the
 * bounds as far as there is room. Null stays null.
 */
export function placeLabels(
  wanted: readonly (number | null)[],
  step: number,
  top: number,
  bottom: number,
): (number | null)[] {
  const order = wanted
    .flatMap((value, index) => (value === null ? [] : [{ value, index }]))
    .sort((a, b) => a.value - b.value || a.index - b.index)
  const placed = [...wanted]
  let floor = top
  for (const { value, index } of order) {
    placed[index] = Math.max(value, floor)
    floor = placed[index] + step
  }
  let ceiling = Math.max(bottom, top + step * (order.length - 1))
  for (const { index } of order.toReversed()) {
    placed[index] = Math.min(placed[index]!, ceiling)
    ceiling = placed[index] - step
  }
  return placed
}

import fc, { type Arbitrary } from 'fast-check'

/** Evenly spread over the orders of magnitude between two ends. */
function spread(low: number, high: number): Arbitrary<number> {
  const [from, to] = [Math.log(low), Math.log(high)]
  return fc
    .nat({ max: 1_000_000 })
    .map((share) => Number(Math.exp(from + (share / 1_000_000) * (to - from)).toPrecision(6)))
}

/** A number as it usually is, sometimes far off, rarely anywhere from 1e-30 to 1e30. */
export function magnitude(low: number, high: number): Arbitrary<number> {
  return fc.oneof(
    { weight: 60, arbitrary: spread(low, high) },
    { weight: 3, arbitrary: spread(low / 1000, high * 1000) },
    { weight: 1, arbitrary: spread(1e-30, 1e30) },
  )
}

export function quantity(unit: string, low: number, high: number): Arbitrary<string> {
  return magnitude(low, high).map((value) => `${value} ${unit}`)
}

/** Where zero is allowed it is tried as well. */
export function quantityOrZero(unit: string, low: number, high: number): Arbitrary<string> {
  return fc.oneof(
    { weight: 9, arbitrary: quantity(unit, low, high) },
    { weight: 1, arbitrary: fc.constant(`0 ${unit}`) },
  )
}

/** Temperatures of parts and rooms, now and then one that no part has seen. */
export const temperature: Arbitrary<string> = fc.oneof(
  { weight: 30, arbitrary: fc.integer({ min: -40, max: 150 }).map((value) => `${value} degC`) },
  { weight: 1, arbitrary: fc.constantFrom('-273 degC', '1 K', '0.001 K', '1000 degC', '10000 K', '1e30 K') },
)

/** Where parts are cooled, mostly as people have it. */
export const surroundings: Arbitrary<string> = fc.oneof(
  { weight: 8, arbitrary: fc.integer({ min: -20, max: 70 }).map((value) => `${value} degC`) },
  { weight: 1, arbitrary: temperature },
)

/** A limit of a junction, mostly one that leaves room. */
export const junctionLimit: Arbitrary<string> = fc.oneof(
  { weight: 8, arbitrary: fc.integer({ min: 100, max: 200 }).map((value) => `${value} degC`) },
  { weight: 1, arbitrary: temperature },
)

/** A group of keys of which some may be left out. */
export function group(
  always: Readonly<Record<string, Arbitrary<unknown>>>,
  sometimes: Readonly<Record<string, Arbitrary<unknown>>> = {},
): Arbitrary<Record<string, unknown>> {
  return fc.record({ ...always, ...sometimes }, { requiredKeys: Object.keys(always) })
}

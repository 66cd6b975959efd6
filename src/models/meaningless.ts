/**
 * Error for an input that leaves an equation without meaning (division by zero, negative charge).
 *
 * @returns The error to throw; it names model, input and value.
 */
export function meaningless(model: string, input: string, value: number): RangeError {
  return new RangeError(`${model}: ${input} = ${value} has no meaning`)
}

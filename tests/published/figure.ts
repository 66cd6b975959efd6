/** How a source stands: seen in the document, quoted by another, recalled, or evaluated here from a published formula. */
type Standing = 'read' | 'second-hand' | 'from memory' | 'own'

/** One figure of a case: what is printed and what the engine has to give. */
export interface Figure {
  /** Name in the record that `compute` returns. */
  readonly quantity: string
  /** Unit of the printed number, and its size in SI. */
  readonly unit: string
  readonly scale: number
  /** The number as printed, with its digits. */
  readonly printed: string
  /** Where the print is wrong: the right number, and why the print is not it. */
  readonly misprint?: { readonly right: string; readonly because: string }
  /** Instead of half a unit of the last printed digit: absolute, in the printed unit. */
  readonly tolerance?: { readonly absolute: number; readonly because: string }
}

/** A worked example with its inputs. */
interface Case<Input> {
  readonly name: string
  readonly input: Input
  readonly figures: readonly Figure[]
}

/** One source with the cases it gives, and how the engine computes them. */
export interface PublishedRow {
  /** Row of the list of sources (P01 to P42), or the check table it stands for. */
  readonly id: string
  /** Ids of the models that the cases exercise. */
  readonly models: readonly string[]
  readonly source: string
  readonly standing: Standing
  readonly evaluate: () => readonly Evaluated[]
}

/** A case after computing, SI. */
interface Evaluated {
  readonly name: string
  readonly figures: readonly Figure[]
  readonly computed: Readonly<Record<string, number>>
}

/** What {@link published} takes: a row with typed inputs. */
export interface RowInput<Input> extends Omit<PublishedRow, 'evaluate'> {
  readonly compute: (input: Input) => Readonly<Record<string, number>>
  readonly cases: readonly Case<Input>[]
}

/** Closes the type of the inputs, so that rows of different models stand in one list. */
export function published<Input>({ compute, cases, ...row }: RowInput<Input>): PublishedRow {
  const evaluate = () => cases.map(({ name, input, figures }) => ({ name, figures, computed: compute(input) }))
  return { ...row, evaluate }
}

/** Figures of one line of a table: the columns once, the printed numbers line by line. */
export function line(
  columns: readonly (readonly [string, string, number])[],
  printed: readonly string[],
): readonly Figure[] {
  return columns.map(([quantity, unit, scale], index) => ({ quantity, unit, scale, printed: printed[index]! }))
}

/** Range in which a model's input makes sense; null is open. */
export interface ModelRange {
  /** Name of the input, or of a ratio of inputs. */
  readonly input: string
  readonly low: number | null
  readonly high: number | null
  /** SI unit of the limits. */
  readonly unit: string
}

/** One published or own method: the single place where its range, source and bias stand. */
export interface ModelEntry {
  /** Author-year, standard or document number, or what it is where nobody is to be named. */
  readonly id: string
  /** Module in this folder. */
  readonly file: string
  /** Exported functions that make up the method. */
  readonly functions: readonly string[]
  readonly equation: string
  readonly validity: readonly ModelRange[]
  readonly source: string
  /** What is known to be wrong with it; "none known" where nothing is. */
  readonly bias: string
}

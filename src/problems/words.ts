import type { Problem, ProblemCode } from './problem.ts'

/** The sentence of a problem, without its place: one function per code. */
export function problemSentence(problem: Problem): string {
  return words[problem.code](problem)
}

const words: Readonly<Record<ProblemCode, (problem: Problem) => string>> = {
  'file-missing': (p) => `there is no such file or folder${aside(p.hint)}`,
  'file-unreadable': (p) => `cannot be read${because(p.found)}${aside(p.hint)}`,
  'file-too-large': (p) => `is too large (${p.found}); at most ${p.expected} are read${next(p.hint)}`,
  'file-empty': (p) => `holds nothing; wanted is ${p.expected}`,
  'file-not-text': (p) => `is not text in UTF-8: ${p.found}${next(p.hint)}`,
  'file-kind': (p) => `this is ${p.found}; wanted is ${p.expected}${aside(p.hint)}`,
  'file-exists': (p) => `exists already and is not overwritten${next(p.hint)}`,
  'file-is-input': (p) => `is read by this command and is not overwritten${next(p.hint)}`,
  'file-unwritable': (p) => `cannot be written${because(p.found)}${next(p.hint)}`,

  'yaml-syntax': (p) => `${p.expected}${aside(p.hint)}`,
  'yaml-duplicate-key': (p) => `"${p.found}" stands here twice; keep one${aside(p.hint)}`,
  'yaml-forbidden': (p) => `${p.found} cannot be used here${next(p.hint)}`,
  'yaml-too-deep': (p) => `is nested deeper than ${p.expected}`,

  'key-unknown': (p) => `"${p.found}" is no key here${aside(p.hint || `known: ${p.expected}`)}`,
  'key-missing': (p) => `is missing; wanted is ${p.expected}${next(p.hint)}`,
  'key-not-here': (p) => `cannot stand here: ${p.expected}${next(p.hint)}`,
  'word-unknown': (p) => `"${p.found}" is not one of ${p.expected}${aside(p.hint)}`,
  'value-kind': (p) => `${p.found} stands where ${p.expected} is wanted${aside(p.hint)}`,
  'list-length': (p) => `${p.found}; wanted is ${p.expected}${aside(p.hint)}`,

  'unit-missing': (p) => `${quoted(p.found)} has no unit; wanted is ${p.expected}${aside(p.hint)}`,
  'unit-unknown': (p) =>
    `${quoted(p.found)}: "${unitOf(p.found)}" is no unit here${aside(p.hint || `wanted is ${p.expected}`)}`,
  'unit-dimension': (p) => `${quoted(p.found)}: ${p.hint}; wanted is ${p.expected}`,
  'number-malformed': (p) => `${quoted(p.found)} is not a number with a unit; wanted is ${p.expected}${aside(p.hint)}`,
  'number-decimal-comma': (p) =>
    `${quoted(p.found)} has a comma in its number, which is never guessed at${aside(p.hint)}`,
  'number-not-finite': (p) => `${quoted(p.found)} is not a finite number; wanted is ${p.expected}`,
  'number-out-of-range': (p) => `${quoted(p.found)} is outside what can be used: ${p.expected}${aside(p.hint)}`,
  'number-zero': (p) => `${quoted(p.found)} is zero; wanted is ${p.expected}${aside(p.hint)}`,
  'number-negative': (p) => `${quoted(p.found)} is negative; wanted is ${p.expected}${aside(p.hint)}`,

  'values-contradict': (p) => `${quoted(p.found)} cannot be: ${p.expected}${next(p.hint)}`,

  'id-duplicate': (p) => `"${p.found}" is the id of two records; the other stands at ${p.expected}${aside(p.hint)}`,
  'id-unknown': (p) => `no record has the id "${p.found}"${aside(p.hint || p.expected)}`,

  'table-column-unknown': (p) => `there is no column ${quoted(p.found)}; the columns are ${p.expected}${aside(p.hint)}`,
  'table-cell': (p) => `${quoted(p.found)} cannot be used; ${p.expected}${aside(p.hint)}`,
  'table-malformed': (p) => `${p.found}; wanted is ${p.expected}${aside(p.hint)}`,

  'option-unusable': (p) => `${p.found}${p.expected === '' ? '' : `; wanted is ${p.expected}`}${aside(p.hint)}`,

  'cannot-deliver': (p) => `the stage cannot deliver this power: ${p.found}${next(p.hint)}`,
  'no-candidate': (p) => `there is no rectifier to rank${because(p.found)}${next(p.hint)}`,
  'quantity-not-applicable': (p) => `${quoted(p.found)} does not apply to this stage: ${p.expected}${next(p.hint)}`,
  'range-reversed': (p) =>
    `the range runs from ${p.found} to ${p.expected}; its start must be the smaller${next(p.hint)}`,
  'range-outside': (p) => `${p.found} is outside the range that can be studied: ${p.expected}${next(p.hint)}`,

  'value-implausible': (p) => `${quoted(p.found)} is unusual; ${p.expected}${aside(p.hint)}`,
  'value-unused': (p) => `${quoted(p.found)} is not used: ${p.expected}${aside(p.hint)}`,
  'more-problems': (p) => `and ${p.found} more; these come first`,
}

function aside(hint: string): string {
  return hint === '' ? '' : ` (${hint})`
}
function next(hint: string): string {
  return hint === '' ? '' : `; ${hint}`
}
function because(reason: string): string {
  return reason === '' ? '' : `: ${reason}`
}
function quoted(found: string): string {
  return `"${found}"`
}

/** "khz" of "100 khz": what follows the number. */
function unitOf(found: string): string {
  return found.replace(/^\s*[-+\u2212]?[\d.]*(?:[eE][-+\u2212]?\d+)?\s*/, '')
}

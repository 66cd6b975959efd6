import { createRequire } from 'node:module'
import { findRoot } from '../../src/numerics/find-root.ts'

type Derivative = (x: number, y: number[]) => number[]

interface OdexSolver {
  absoluteTolerance: number
  relativeTolerance: number
  solve(f: Derivative, x: number, y: number[], xEnd: number): { readonly y: number[]; readonly outcome: number }
}

// the package is CommonJS and ships its sources instead of type declarations
const { Solver } = createRequire(import.meta.url)('odex') as { readonly Solver: new (n: number) => OdexSolver }

/** Tolerance asked of the solver, with variables of size 1; comparisons allow a hundred times as much for the run's sum. */
export const odeTolerance = 1e-11

/** State at xEnd by the extrapolation method of E. Hairer & G. Wanner: a second route that shares nothing with the models. */
export function solveOde(f: Derivative, x: number, y: readonly number[], xEnd: number): number[] {
  if (xEnd === x) return [...y]
  const solver = new Solver(y.length)
  solver.absoluteTolerance = odeTolerance
  solver.relativeTolerance = odeTolerance
  const result = solver.solve(f, x, [...y], xEnd)
  if (result.outcome !== 0) throw new Error(`the solver gave up between ${x} and ${xEnd}`)
  return result.y
}

/** Time at which `event` of the state crosses zero, located by repeated solution. */
export function solveToEvent(
  f: Derivative,
  start: { readonly x: number; readonly y: readonly number[]; readonly xMost: number },
  event: (x: number, y: number[]) => number,
): { readonly x: number; readonly y: number[] } {
  const at = (x: number) => event(x, solveOde(f, start.x, start.y, x))
  const found = findRoot({ f: at, low: start.x, high: start.xMost, tolerance: 1e-13, maxIterations: 100 })
  if (found === null) throw new Error('the event does not happen in this time')
  return { x: found.root, y: solveOde(f, start.x, start.y, found.root) }
}

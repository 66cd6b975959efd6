import { spawnSync } from 'node:child_process'
import { mkdirSync } from 'node:fs'
import type { Kernel } from '../../src/stage/kernel.ts'
import type { Candidate } from '../../src/study/candidate.ts'
import { slopeFactors } from './points.ts'

export interface CReference {
  readonly pointsPerSecond: number
  /** Mean junction temperature over all points: equal to ours when it does the same work. [K] */
  readonly meanJunction: number
}

const folder = 'dist/build/tools'
const program = `${folder}/points-in-c`

/** Compiles the C version; false where the machine has no compiler. */
export function compileReference(): boolean {
  mkdirSync(folder, { recursive: true })
  return spawnSync('cc', ['-O2', '-o', program, 'tests/bench/points-in-c.c', '-lm']).status === 0
}

/** The same points by straightforward C. */
export function runReference(candidates: readonly Candidate[], seconds: number): CReference {
  const numbers = [seconds, slopeFactors.length, ...slopeFactors, candidates.length]
  for (const { kernel } of candidates) numbers.push(...numbersOf(kernel))
  const { stdout } = spawnSync(program, { input: numbers.join('\n'), encoding: 'utf8' })
  const [pointsPerSecond, meanJunction] = stdout.split(' ').map(Number)
  return { pointsPerSecond: pointsPerSecond!, meanJunction: meanJunction! }
}

/** In the order of the struct in points-in-c.c. */
function numbersOf(kernel: Kernel): number[] {
  const { thermal, part, turnOff } = kernel
  return [
    ...[kernel.inputVoltage, kernel.outputVoltage, kernel.outputCurrent, kernel.frequency],
    ...[kernel.inductance, kernel.inductorResistance, kernel.coreLoss, kernel.onResistance25],
    ...[kernel.onResistancePerKelvin, kernel.slope, kernel.voltageFall, kernel.loopInductance],
    ...[turnOff.voltageRise, turnOff.currentFall, kernel.storedEnergy],
    ...[thermal.reference, thermal.junctionSelf, thermal.common, thermal.switchSelf],
    ...[part.ratedCurrent, part.ratedVoltage, part.capacitiveCharge, part.chargingCost],
    ...kernel.coefficients,
    ...[Number(part.leaks), Number(part.storesCharge)],
  ]
}

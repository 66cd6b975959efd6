import type { CalibratedRectifier, JunctionCapacitance } from '../domain/calibrated-rectifier.ts'
import { celsiusZero, referenceSlope } from '../domain/constants.ts'
import type { RectifierRecord } from '../domain/rectifier.ts'
import type { Stage } from '../domain/stage.ts'
import { capacitiveCharge, chargingCost } from '../models/junction-capacitance.ts'
import { hottestShare, otherShare } from '../models/parallel-sharing.ts'
import { blockingVoltage, placeConditions } from './evaluate.ts'
import { type Kernel, type PartConstants, type PartState, type RecoveryEvent, rowCount } from './kernel.ts'
import { createLineGrid } from './line-cycle.ts'
import { thermalNetwork } from './thermal-network.ts'

/** Junction at which the switch's resistance is taken when its temperature is not solved. [K] */
const assumedSwitchJunction = celsiusZero + 100

/** Where one kernel stands: a stage, a part, and what a sweep or a load changes. */
export interface KernelSetup {
  readonly stage: Stage
  readonly record: RectifierRecord
  readonly rectifier: CalibratedRectifier
}

/** Voltage that a stage's rectifier blocks at its own input, or another. [V] */
export function blockingVoltageOf(stage: Stage, inputVoltage = stage.input.voltage): number {
  return blockingVoltage(stage.kind, inputVoltage, stage.output.voltage)
}

/** Allocates the working store of one candidate at the stage's nominal conditions. */
export function createKernel({ stage, record, rectifier }: KernelSetup): Kernel {
  const { parts, imbalance } = stage.parallel
  const hotShare = hottestShare({ parts, imbalance })
  const coolShare = otherShare({ parts, imbalance })
  const slope = stage.switch.slope
  const kernel: Kernel = {
    kind: stage.kind,
    inputVoltage: stage.input.voltage,
    outputVoltage: stage.output.voltage,
    outputCurrent: stage.output.current,
    frequency: stage.frequency,
    inductance: stage.inductor.inductance,
    inductorResistance: stage.inductor.resistance,
    coreLoss: stage.inductor.coreLoss,
    onResistance25: stage.switch.onResistance,
    onResistancePerKelvin: stage.switch.onResistancePerKelvin,
    slope: slope.kind === 'given' ? slope.slope : 0,
    gate: slope.kind === 'gate' ? slope : null,
    slopeFactor: 1,
    voltageFall: stage.switch.voltageFall,
    loopInductance: stage.loopInductance ?? 0,
    turnOff: turnOffOf(stage),
    // A measured turn-off already holds the switch's own output energy.
    storedEnergy: stage.switch.turnOff?.kind === 'energy' ? 0 : stage.switch.storedEnergy,
    turnOn: { current: 0, voltage: 0, energy: 0, addedShare: 1 },
    parts,
    hotShare,
    otherShare: coolShare,
    thermal: thermalNetwork(stage, record),
    part: partConstants(record, rectifier),
    coefficients: nominalCoefficients(rectifier),
    hot: emptyState(hotShare, 1),
    other: emptyState(coolShare, parts - 1),
    instant: {
      inputVoltage: 0.5,
      blockingVoltage: 0.5,
      duty: 0.5,
      conductionShare: 0.5,
      meanCurrent: 0.5,
      ripple: 0.5,
      valley: 0.5,
      peak: 0.5,
      continuousValley: 0.5,
      discontinuous: false,
      idleVoltage: 0.5,
    },
    held: { temperatures: new Float64Array(3), crestCurrent: 0.5, current: 0.5 },
    turnOnSlope: 0.5,
    weight: 0.5,
    startCurrent: 0.5,
    blockingLog: 0.5,
    hotEvent: emptyEvent(),
    otherEvent: emptyEvent(),
    rows: new Float64Array(rowCount),
    temperatures: new Float64Array(3),
    onResistance: stage.switch.onResistance,
    delivers: true,
    line: createLineGrid(),
  }
  kernel.temperatures.fill(kernel.thermal.reference)
  kernel.temperatures[1] = kernel.thermal.switchSolved ? kernel.thermal.reference : assumedSwitchJunction
  placeConditions(kernel)
  placeCapacitance(kernel, rectifier.capacitance)
  return kernel
}

/** Charge of the junction and what it costs the switch, at the blocking voltage. */
function placeCapacitance(kernel: Kernel, capacitance: JunctionCapacitance | null): void {
  const voltage = kernel.instant.blockingVoltage
  kernel.part.capacitiveCharge = capacitance === null ? 0 : capacitiveCharge({ capacitance, voltage })
  kernel.part.chargingCost = capacitance === null ? 0 : chargingCost({ capacitance, voltage })
}

/** Posterior means in the kernel's order. */
export function nominalCoefficients(rectifier: CalibratedRectifier): Float64Array {
  const out = new Float64Array(17)
  if (rectifier.recovery !== null) out.set(rectifier.recovery.posterior.mean, 0)
  out.set(rectifier.forward.posterior.mean, 8)
  if (rectifier.leakage !== null) out.set(rectifier.leakage.posterior.mean, 14)
  return out
}

function turnOffOf(stage: Stage): Kernel['turnOff'] {
  const given = stage.switch.turnOff
  if (given === null) return { kind: 'none', voltageRise: 0, currentFall: 0, energy: 0 }
  if (given.kind === 'energy') return { kind: 'energy', voltageRise: 0, currentFall: 0, energy: given.energy }
  return { kind: 'times', voltageRise: given.voltageRise, currentFall: given.currentFall, energy: 0 }
}

function partConstants(record: RectifierRecord, rectifier: CalibratedRectifier): PartConstants {
  const channel = record.deadTime === null ? null : record.channel
  return {
    storesCharge: rectifier.storesCharge,
    leaks: rectifier.leakage !== null,
    line: rectifier.forward.line,
    ratedCurrent: rectifier.ratedCurrent,
    ratedVoltage: rectifier.ratedVoltage,
    capacitiveCharge: 0,
    chargingCost: 0,
    forwardRecoveryPeak: record.forwardRecovery?.peak ?? 0,
    forwardRecoveryTime: record.forwardRecovery?.time ?? 0,
    forwardRecoverySlope: record.forwardRecovery?.slope ?? 1,
    synchronous: channel !== null,
    deadBefore: record.deadTime?.before ?? 0,
    deadAfter: record.deadTime?.after ?? 0,
    channelResistance25: channel?.onResistance ?? 0,
    channelPerKelvin: channel?.perKelvin ?? 0,
  }
}

function emptyState(share: number, count: number): PartState {
  return {
    share,
    count,
    slope: 0.5,
    slopeLog: Math.log(0.5 / referenceSlope),
    lifetimeLog: 0.5,
    ratioLog: 0.5,
    constant: 0.5,
    logarithmic: 0.5,
    linear: 0.5,
    leakageLog: -0.5,
    leakage: 0,
    channelResistance: 0.5,
    conducted: 0.5,
    chord: false,
  }
}

function emptyEvent(): RecoveryEvent {
  return {
    current: 0.5,
    slope: 0.5,
    lifetime: 0.5,
    tailTime: 0.5,
    storedCharge: 0.5,
    timeToPeak: 0.5,
    peakReverseCurrent: 0.5,
    charge: 0.5,
    tailShare: 0.5,
    rectifierEnergy: 0.5,
    switchAddedEnergy: 0.5,
    outcome: 'no-stored-charge',
  }
}

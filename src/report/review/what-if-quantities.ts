import { celsiusZero } from '../../domain/constants.ts'
import type { StageResult } from '../../domain/result.ts'
import type { Stage } from '../../domain/stage.ts'

export type WhatIfQuantity = 'frequency' | 'load' | 'slope' | 'ambient' | 'input'

/** One control: its issued value and range in the unit it shows. */
export interface WhatIfControl {
  readonly over: WhatIfQuantity
  readonly name: string
  readonly unit: string
  readonly issued: number
  readonly low: number
  readonly high: number
  /** Equal ratios along the slider. */
  readonly logarithmic: boolean
}

/** The quantities a reader may move; ambient only where the stage has one. */
export function whatIfControls(stage: Stage, result: StageResult): readonly WhatIfControl[] {
  const { cooling, input } = stage
  const around = (value: number) => ({ issued: short(value), low: short(value / 4), high: short(value * 4) })
  const ambient = cooling.kind === 'case' ? null : short(cooling.ambientTemperature - celsiusZero)
  return [
    {
      over: 'frequency',
      name: 'Switching frequency',
      unit: 'kHz',
      ...around(stage.frequency * 1e-3),
      logarithmic: true,
    },
    { over: 'load', name: 'Load, share of full', unit: '%', issued: 100, low: 5, high: 150, logarithmic: false },
    ...(result.slope_a_per_s > 0
      ? ([
          {
            over: 'slope',
            name: 'Current slope',
            unit: 'A/µs',
            ...around(result.slope_a_per_s * 1e-6),
            logarithmic: true,
          },
        ] as const)
      : []),
    ...(ambient === null
      ? []
      : ([
          {
            over: 'ambient',
            name: 'Ambient',
            unit: '°C',
            issued: ambient,
            low: Math.min(-20, ambient),
            high: Math.max(100, ambient + 40),
            logarithmic: false,
          },
        ] as const)),
    {
      over: 'input',
      name: input.kind === 'mains' ? 'Mains voltage, rms' : 'Input voltage',
      unit: 'V',
      issued: short(input.voltage),
      ...inputRange(stage),
      logarithmic: false,
    },
  ]
}

/** Inputs the stage can convert, kept off the very edge. */
function inputRange({ kind, input, output }: Stage): { readonly low: number; readonly high: number } {
  const { voltage } = input
  if (kind === 'buck') return { low: short(Math.max(voltage / 2, output.voltage * 1.02)), high: short(voltage * 2) }
  if (kind === 'inverting') return { low: short(voltage / 2), high: short(voltage * 2) }
  const edge = input.kind === 'mains' ? output.voltage / (Math.SQRT2 * (1 + input.tolerance)) : output.voltage
  return { low: short(voltage / 2), high: short(Math.max(voltage, Math.min(voltage * 2, edge * 0.99))) }
}

/** The SI value that a control stands for. */
export function whatIfValue(over: WhatIfQuantity, shown: number): number {
  switch (over) {
    case 'frequency':
      return shown * 1e3
    case 'load':
      return shown / 100
    case 'slope':
      return shown * 1e6
    case 'ambient':
      return shown + celsiusZero
    case 'input':
      return shown
  }
}

function short(value: number): number {
  return Number(value.toPrecision(6))
}

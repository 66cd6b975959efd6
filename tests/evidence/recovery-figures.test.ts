import { describe, expect, it } from 'vitest'
import { logFigure, type RampReading, steadyEvent } from '../../src/evidence/recovery-figures.ts'

const names = ['recoveryTime', 'charge', 'peakReverseCurrent', 'softness'] as const

function reading(fields: Partial<RampReading> = {}): RampReading {
  return { current: 8, slope: 200e6, recoveryTimeBy: { kind: 'line-90-25' }, softnessBy: 'times', ...fields }
}

function figures(at: RampReading, lifetime: number, tailTime: number) {
  const event = steadyEvent(at, Math.log(lifetime), Math.log(lifetime / tailTime - 1))
  return Object.fromEntries(names.map((name) => [name, Math.exp(logFigure(event, at, name).value)]))
}

describe('recovery figures of the charge model', () => {
  // PHYSICS section 1, steady start, k = 1.87896: printed to six digits
  it.each([
    [8, 200, 60, 20, 5.37575, 64.458, 179.762, 1.3981],
    [1, 50, 150, 30, 1.95256, 95.42, 96.7016, 1.44346],
    [20, 500, 400, 120, 32.1146, 289.705, 4885.11, 3.51048],
    [0.5, 100, 25, 5, 0.82082, 17.603, 7.47283, 1.14456],
  ])(
    'at %d A, %d A/µs, tau %d ns, tau_rr %d ns are the tabulated ones',
    (current, slope, tau, tail, peak, trr, charge, softness) => {
      const found = figures(reading({ current, slope: slope * 1e6 }), tau * 1e-9, tail * 1e-9)
      expect(found.peakReverseCurrent! / peak).toBeCloseTo(1, 5)
      expect(found.recoveryTime! / (trr * 1e-9)).toBeCloseTo(1, 5)
      expect(found.charge! / (charge * 1e-9)).toBeCloseTo(1, 5)
      expect(found.softness! / softness).toBeCloseTo(1, 5)
    },
  )

  it('give the ratio of slopes as tau_rr over ta, which is not the ratio of times', () => {
    const found = figures(reading({ softnessBy: 'slopes' }), 60e-9, 20e-9)
    expect(found.softness).toBeCloseTo(20 / 26.8787, 4)
  })

  it.each([
    ['line-90-25', reading()],
    ['an absolute level', reading({ recoveryTimeBy: { kind: 'level', until: 0.3 } })],
    ['a level hardly below the peak', reading({ recoveryTimeBy: { kind: 'level', until: 4.568 } })],
    ['a level above the peak', reading({ recoveryTimeBy: { kind: 'level', until: 9 } })],
    ['slopes', reading({ softnessBy: 'slopes', recoveryTimeBy: { kind: 'level-10' } })],
  ] as const)('have derivatives that agree with differences (%s)', (_, at) => {
    const u = Math.log(45e-9)
    const y = 0.7
    const event = steadyEvent(at, u, y)
    const step = 1e-5
    for (const name of names) {
      const value = (du: number, dy: number, di: number, da: number) => {
        const moved = { ...at, current: at.current * Math.exp(di), slope: at.slope * Math.exp(da) }
        return logFigure(steadyEvent(moved, u + du, y + dy), moved, name).value
      }
      const difference = (...d: readonly [number, number, number, number]) =>
        (value(...d) - value(-d[0], -d[1], -d[2], -d[3])) / (2 * step)
      const exact = logFigure(event, at, name)
      expect(exact.byLifetime).toBeCloseTo(difference(step, 0, 0, 0), 7)
      expect(exact.byRatio).toBeCloseTo(difference(0, step, 0, 0), 7)
      expect(exact.byCurrent).toBeCloseTo(difference(0, 0, step, 0), 7)
      expect(exact.bySlope).toBeCloseTo(difference(0, 0, 0, step), 7)
    }
  })

  it('scale as times do: stretching tau, tau_rr and I/a by one factor stretches ta by it', () => {
    const event = steadyEvent(reading(), Math.log(60e-9), Math.log(2))
    expect(event.timeByLifetime + event.timeByCurrent).toBeCloseTo(event.timeToPeak, 20)
  })
})

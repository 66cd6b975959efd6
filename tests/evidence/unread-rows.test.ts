import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { gradeEvidence } from '../../src/evidence/grade-evidence.ts'
import { provenanceAt } from '../../src/evidence/provenance.ts'
import { forwardRow, kelvin, leakageRow, place, rampRow, record } from './records.ts'

const condition = { current: 8, slope: 200e6, junction: kelvin(100) }

function worth(fields: Partial<RectifierRecord>) {
  const { read, rectifier, caveats } = calibrate({ record: record(fields), blockingVoltage: 400 })
  const origins = provenanceAt({
    record: read,
    rectifier,
    condition,
    forwardCurrent: 8,
    blockingVoltage: 400,
    event: null,
  })
  return {
    grade: gradeEvidence({ record: read, rectifier, condition }),
    from: (figure: string) => origins.provenance.find((entry) => entry.figure === figure)!.from,
    codes: [...caveats, ...origins.caveats].map(({ code }) => code),
  }
}

describe('a row that could not be read is no evidence', () => {
  const far = rampRow({ charge: 40e-9, current: 1, slope: 50e6, place: place('typical far away') })
  const unreadable = rampRow({
    charge: 1e9,
    slope: 200e6,
    junction: kelvin(100),
    grade: 'measured',
    place: place('measured here'),
  })

  it('a measured recovery row at the point earns no A, no origin, and hides no warning', () => {
    const { grade, from, codes } = worth({ forward: [forwardRow()], recovery: [far, unreadable] })
    expect(codes).toContain('row-impossible')
    expect(grade).toBe('C')
    expect(from('event.qrr_c')).toBe('typical far away')
    expect(codes, 'the measured row told nothing').toContain('typical-only')
    expect(codes, 'the only row lies far away').toContain('extrapolated-far')
  })

  it('nor does a forward row of a Schottky part', () => {
    const whole = {
      class: 'schottky',
      leakage: [leakageRow()],
      capacitance: { kind: 'charge', charge: 1e-9, voltage: 50 },
    } as const
    const nothing = forwardRow({ drop: 0, junction: kelvin(100), grade: 'measured', place: place('no drop') })
    const { grade, from, codes } = worth({ ...whole, forward: [forwardRow({ place: place('cold') }), nothing] })
    expect(grade).toBe('C')
    expect(from('forward_v')).toBe('cold')
    expect(codes).toContain('typical-only')
  })
})

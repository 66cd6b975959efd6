import { describe, expect, it } from 'vitest'
import type { Cooling, Stage } from '../../src/domain/stage.ts'
import { assumedResistances, hasThermalPath, junctionLimitOf, thermalNetwork } from '../../src/stage/thermal-network.ts'
import { kelvin, silicon, stage } from './samples.ts'

const onCase: Cooling = { kind: 'case', caseTemperature: kelvin(80) }
const shared: Cooling = { kind: 'sink', ambientTemperature: kelvin(40), sinkToAmbient: 1.2, shared: true }
const own: Cooling = { ...shared, shared: false }
const inAir: Cooling = { kind: 'ambient', ambientTemperature: kelvin(30) }

const mounted = silicon({ thermal: { kind: 'case', junctionToCase: 1.8, caseToSink: 0.4 } })
const free = silicon({ thermal: { kind: 'ambient', junctionToAmbient: 45, mounting: null } })
const unknown = silicon({ thermal: null })
const half = silicon({ thermal: { kind: 'case', junctionToCase: null, caseToSink: null } })

const at = (cooling: Cooling, fields: Partial<Stage['switch']> = {}): Stage => stage({ cooling, switch: fields })

describe('the thermal network', () => {
  it('on a shared sink: both parts, each over its own resistance', () => {
    expect(thermalNetwork(at(shared), mounted)).toEqual({
      reference: kelvin(40),
      junctionSelf: 1.8 + 0.4,
      common: 1.2,
      switchSelf: 0.8,
      rectifierOnSink: true,
      switchSolved: true,
      switchOnSink: true,
      factor: 1,
      ceiling: kelvin(150) + 100,
    })
  })

  it('on a sink of its own: the switch is not solved', () => {
    expect(thermalNetwork(at(own), mounted)).toMatchObject({
      common: 1.2,
      rectifierOnSink: true,
      switchSolved: false,
      switchOnSink: false,
    })
  })

  it('on a fixed case: no sink, the case also holds the switch', () => {
    expect(thermalNetwork(at(onCase), mounted)).toMatchObject({
      reference: kelvin(80),
      junctionSelf: 1.8,
      common: 0,
      switchSelf: 0.8,
      rectifierOnSink: false,
      switchSolved: true,
      switchOnSink: false,
    })
  })

  it('in air: junction to ambient directly; on a shared sink the switch alone warms that sink', () => {
    expect(thermalNetwork(at(inAir), free)).toMatchObject({
      reference: kelvin(30),
      junctionSelf: 45,
      common: 0,
      rectifierOnSink: false,
      switchSolved: false,
      switchOnSink: false,
    })
    expect(thermalNetwork(at(shared), free)).toMatchObject({
      junctionSelf: 45,
      common: 1.2,
      rectifierOnSink: false,
      switchSolved: true,
      switchOnSink: true,
    })
  })

  it('a switch without thermal data is not solved, on a sink or on a case', () => {
    for (const cooling of [shared, onCase])
      expect(thermalNetwork(at(cooling, { thermal: null }), mounted)).toMatchObject({
        switchSelf: 0,
        switchSolved: false,
        switchOnSink: false,
      })
  })

  it('stands in with 2 and 0.5 K/W where the record gives none', () => {
    for (const part of [unknown, half]) {
      expect(thermalNetwork(at(shared), part).junctionSelf).toBe(2.5)
      expect(thermalNetwork(at(onCase), part).junctionSelf).toBe(2)
    }
  })
})

describe('what had to be assumed', () => {
  it.each([
    ['nothing that is given', shared, mounted, []],
    ['both on a sink', shared, unknown, ['junction_to_case', 'case_to_sink']],
    ['both on a sink with an empty record', shared, half, ['junction_to_case', 'case_to_sink']],
    ['only the case on a fixed case', onCase, half, ['junction_to_case']],
    [
      'only the mounting',
      shared,
      silicon({ thermal: { kind: 'case', junctionToCase: 2, caseToSink: null } }),
      ['case_to_sink'],
    ],
    ['nothing for a part in air on a sink', shared, free, []],
    ['nothing in air', inAir, unknown, []],
  ] as const)('%s', (_, cooling, part, missing) => {
    expect(assumedResistances(at(cooling), part)).toEqual(missing)
  })
})

describe('a path for the heat', () => {
  it.each([
    ['a fixed case needs a part with a case', onCase, mounted, true],
    ['a part in air has no way to a case', onCase, free, false],
    ['air needs a part rated in air', inAir, free, true],
    ['a part with a case has no way to the air', inAir, mounted, false],
    ['a part without data has none to the air', inAir, unknown, false],
    ['a part without data takes the stand-ins on a case', onCase, unknown, true],
    ['a sink takes a part in air too, beside it', shared, free, true],
    ['a sink takes a part with a case', shared, mounted, true],
  ] as const)('%s', (_, cooling, part, there) => {
    expect(hasThermalPath(at(cooling), part)).toBe(there)
  })
})

describe('the junction limit', () => {
  it('is the lower of rating and stage, the rating where the stage has none', () => {
    const limited = (junction: number | null): Stage => stage({ limits: { junction, voltageUse: 0.8 } })
    expect(junctionLimitOf(limited(kelvin(125)), mounted)).toBe(kelvin(125))
    expect(junctionLimitOf(limited(kelvin(200)), mounted)).toBe(kelvin(175))
    expect(junctionLimitOf(limited(null), mounted)).toBe(kelvin(175))
  })
})

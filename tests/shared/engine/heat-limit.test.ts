import { describe, expect, it } from 'vitest'
import {
  defaultHeatLimit,
  FERRITE_MIXES,
  WINDING_WIRES,
  type FerriteMixId,
  type WindingWireId,
} from '#shared/engine/heat-limit.ts'

describe('defaultHeatLimit', () => {
  // Calculation sheet, section 6: mix 43 in polyurethane-155 wire in a plastic box.
  it('is 85 C for mix 43 in polyurethane wire in a plastic box', () => {
    const build = { mix: '43', wire: 'polyurethane-155' } as const
    expect(defaultHeatLimit(build)).toEqual({ limitC: 85, governedBy: 'enclosure' })
  })

  it('is the lowest of core, wire and enclosure', () => {
    const open = 150
    expect(defaultHeatLimit({ mix: '43', wire: 'polyurethane-155', enclosureC: open })).toEqual({
      limitC: 105,
      governedBy: 'core',
    })
    expect(defaultHeatLimit({ mix: '61', wire: 'polyurethane-155', enclosureC: open })).toEqual({
      limitC: 135,
      governedBy: 'wire',
    })
    expect(defaultHeatLimit({ mix: '61', wire: 'pvc' })).toEqual({ limitC: 60, governedBy: 'wire' })
    expect(defaultHeatLimit({ mix: '61', wire: 'pvc', wireClassC: 105 })).toMatchObject({ limitC: 85 })
  })

  it('refuses a mix or wire that is not in the table', () => {
    expect(defaultHeatLimit({ mix: '99' as FerriteMixId, wire: 'pvc' })).toMatchObject({ field: 'mix' })
    expect(defaultHeatLimit({ mix: '43', wire: 'constructor' as WindingWireId })).toMatchObject({
      field: 'wire',
    })
    expect(defaultHeatLimit({ mix: '43', wire: 'pvc', enclosureC: Number.NaN })).toMatchObject({
      code: 'E_NUMBER',
    })
  })

  it('holds the mixes and wires of the sheet', () => {
    const curie = Object.entries(FERRITE_MIXES).map(([mix, { curieMinimumC }]) => [mix, curieMinimumC])
    expect(Object.fromEntries(curie)).toEqual({ '31': 130, '43': 130, '52': 250, '61': 300, '77': 200 })
    expect(Object.values(WINDING_WIRES).map(({ classC }) => classC)).toEqual([
      120, 155, 180, 180, 200, 220, 80, 200,
    ])
  })
})

import { describe, expect, it } from 'vitest'
import { erpOf, exposureExemption, type ExposureExemption } from '#shared/engine/exposure-exemption.ts'
import { expectClose } from '../../support/sheet-close.ts'

describe('exposureExemption', () => {
  // Calculation sheet, section 11 (47 CFR 1.1307(b)(3)(i)(C) Table 1).
  it.each([
    [14.2, 5, 427.743, 3.36243],
    [28.4, 3, 38.4968, 1.68121],
    [146, 1, 3.83, 0.327031],
    [3.6, 15, 59895.8, 13.2629],
  ])('at %f MHz and %i m is up to %f W, from %f m on', (frequencyMhz, distanceM, exemptErpW, nearestM) => {
    const found = exposureExemption({ erpW: 1, distanceM, frequencyMhz }) as ExposureExemption
    expectClose(found.exemptErpW, exemptErpW)
    expectClose(found.nearestM, nearestM)
    expect(found.exempt).toBe(true)
  })

  it.each([
    [1, 1920],
    [440, 0.0128 * 440],
    [2400, 19.2],
  ])('at %f MHz allows %f W per square metre', (frequencyMhz, watts) => {
    expectClose(
      (exposureExemption({ erpW: 1, distanceM: 100, frequencyMhz }) as ExposureExemption).exemptErpW,
      watts * 10_000,
    )
  })

  it('is none above the power or nearer than wavelength/(2 pi)', () => {
    const source = { distanceM: 1, frequencyMhz: 146 }
    expect(exposureExemption({ ...source, erpW: 3.83 })).toMatchObject({ exempt: true })
    expect(exposureExemption({ ...source, erpW: 3.84 })).toMatchObject({
      exempt: false,
      distanceCounts: true,
    })
    expect(exposureExemption({ erpW: 0, distanceM: 0.32, frequencyMhz: 146 })).toMatchObject({
      exempt: false,
      distanceCounts: false,
    })
  })

  it('takes ERP as EIRP over 1.64', () => {
    expectClose(erpOf(100, 2.15), 100.037)
    expect(erpOf(-1, 0)).toMatchObject({ code: 'E_RANGE' })
  })

  it('refuses a distance of 0 and a frequency outside its range', () => {
    expect(exposureExemption({ erpW: 1, distanceM: 0, frequencyMhz: 14 })).toMatchObject({ code: 'E_RANGE' })
    expect(exposureExemption({ erpW: 1, distanceM: 1, frequencyMhz: 0.1 })).toMatchObject({ code: 'E_RANGE' })
  })
})

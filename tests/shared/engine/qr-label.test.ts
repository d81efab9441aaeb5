import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  largeLabelSideMm,
  planQrLabel,
  qrCapacity,
  qrMode,
  qrSideMm,
  readableModuleMm,
  type QrLevel,
  type QrVersion,
} from '#shared/engine/qr-label.ts'

const lower = (length: number) => 'https://h.example/t/'.padEnd(length, 'a')
const upper = (length: number) => 'HTTPS://H.EXAMPLE/T/'.padEnd(length, 'A')

describe('qrCapacity', () => {
  // Calculation sheet, section 13 (confirmed against a printer manual's table).
  it.each<[QrVersion, QrLevel, number, number]>([
    [3, 'M', 42, 61],
    [3, 'Q', 32, 47],
    [4, 'M', 62, 90],
    [4, 'Q', 46, 67],
    [5, 'M', 84, 122],
    [5, 'Q', 60, 87],
    [6, 'M', 106, 154],
    [6, 'Q', 74, 108],
  ])('of version %i-%s is %i bytes or %i alphanumeric characters', (version, level, bytes, characters) => {
    expect(qrCapacity(version, level, 'byte')).toBe(bytes)
    expect(qrCapacity(version, level, 'alphanumeric')).toBe(characters)
  })
})

describe('planQrLabel', () => {
  // Calculation sheet, section 13: both sides of each limit at level Q.
  it.each([
    [lower(32), 3],
    [lower(33), 4],
    [lower(40), 4],
    [lower(46), 4],
    [lower(47), 5],
    [lower(60), 5],
    [lower(61), 6],
    [upper(40), 3],
    [upper(47), 3],
    [upper(48), 4],
    [upper(67), 4],
    [upper(68), 5],
  ])('puts %s on version %i', (text, version) => {
    expect(planQrLabel({ text })).toMatchObject({ version, level: 'Q', modules: 17 + 4 * version })
  })

  it('refuses text beyond version 6 at the chosen level', () => {
    expect(planQrLabel({ text: lower(74) })).toMatchObject({ version: 6 })
    expect(planQrLabel({ text: lower(75) })).toMatchObject({ code: 'QR_TOO_LONG', field: 'text' })
    expect(planQrLabel({ text: lower(106), level: 'M' })).toMatchObject({ version: 6 })
    expect(planQrLabel({ text: lower(107), level: 'M' })).toMatchObject({ code: 'QR_TOO_LONG' })
    expect(planQrLabel({ text: upper(109) })).toMatchObject({ code: 'QR_TOO_LONG' })
    expect(planQrLabel({ text: '' })).toMatchObject({ code: 'E_MISSING' })
  })

  it('counts bytes, not characters', () => {
    expect(planQrLabel({ text: 'é'.repeat(16) })).toMatchObject({ version: 3, mode: 'byte' })
    expect(planQrLabel({ text: 'é'.repeat(17) })).toMatchObject({ version: 4 })
    expect(planQrLabel({ text: '\u{1F4E1}'.repeat(8) })).toMatchObject({ version: 3 })
    expect(qrMode('HTTPS://H.EXAMPLE/T/KT4Z76')).toBe('alphanumeric')
    expect(qrMode('HTTPS://H.EXAMPLE/T?KT4Z76')).toBe('byte')
  })

  it('warns under 0.5 mm and refuses under 0.4 mm', () => {
    expect(planQrLabel({ text: 'A', moduleMm: 0.5 })).toMatchObject({ warnings: [] })
    expect(planQrLabel({ text: 'A', moduleMm: 0.4 })).toMatchObject({ warnings: [{ code: 'W_QR_SMALL' }] })
    expect(planQrLabel({ text: 'A', moduleMm: 0.39 })).toMatchObject({ code: 'E_RANGE', field: 'moduleMm' })
  })

  it('answers any text without throwing', () => {
    fc.assert(
      fc.property(fc.anything(), fc.anything(), (text, moduleMm) => {
        void planQrLabel({ text: text as string, moduleMm: moduleMm as number })
      }),
    )
  })
})

describe('label sizes', () => {
  // Calculation sheet, section 13.
  it.each([
    [3, 0.5, 18.5],
    [3, 0.6, 22.2],
    [4, 0.5, 20.5],
    [4, 0.6, 24.6],
    [5, 0.5, 22.5],
    [5, 0.6, 27.0],
  ])('version %i at %f mm a module is %f mm wide', (version, moduleMm, side) => {
    expect(qrSideMm(version, moduleMm)).toBeCloseTo(side, 10)
  })

  it('takes whole versions only', () => {
    for (const version of [0, 41, 3.5]) expect(qrSideMm(version, 0.6)).toMatchObject({ code: 'E_RANGE' })
  })

  it("wants 0.51 mm at arm's length, and a tenth of the distance for the large label", () => {
    expect(readableModuleMm(400)).toBeCloseTo(0.51, 2)
    expect(largeLabelSideMm(400)).toBe(40)
    expect(largeLabelSideMm(0)).toMatchObject({ code: 'E_RANGE' })
  })
})

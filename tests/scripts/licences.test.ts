import { describe, expect, it } from 'vitest'
import { isApproved, licenceFaults } from '../../scripts/lib/licences.ts'

describe('isApproved', () => {
  it.each([
    'MIT',
    'Apache-2.0',
    '(MIT OR CC0-1.0)',
    'GPL-3.0-only OR MIT',
    'MIT AND (ISC OR GPL-2.0)',
    '0BSD+',
  ])('takes %s', (expression) => expect(isApproved(expression)).toBe(true))

  it.each([
    '',
    'UNLICENSED',
    'SEE LICENSE IN LICENSE.md',
    'CC-BY-4.0',
    'MIT AND Elastic-2.0',
    '(MIT OR ISC) AND SSPL-1.0',
    'MIT OR (ISC',
    'MIT ISC',
  ])('refuses %j', (expression) => expect(isApproved(expression)).toBe(false))
})

describe('licenceFaults', () => {
  it('names the package and its licence', () => {
    const faults = licenceFaults([
      { name: 'good', version: '1.0.0', licence: 'ISC' },
      { name: 'closed', version: '2.0.0', licence: 'UNLICENSED' },
      { name: 'silent', version: '3.0.0', licence: undefined },
    ])
    expect(faults).toEqual([
      'closed@2.0.0 is under UNLICENSED, which is not approved.',
      'silent@3.0.0 names no licence.',
    ])
  })

  it('takes a licence that was read by hand for that version only', () => {
    const read = (version: string) => licenceFaults([{ name: 'png-js', version, licence: undefined }])
    expect(read('2.0.0')).toEqual([])
    expect(read('2.0.1')).toHaveLength(1)
  })
})

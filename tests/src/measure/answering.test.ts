import { describe, expect, it } from 'vitest'
import { isFailure } from '#shared/engine/outcome.ts'
import type { Performance } from '#shared/engine/procedures/judge-test.ts'
import { makeAnswerer } from '@/measure/answering.ts'
import { knownForKit } from '@/measure/known-for-kit.ts'
import { filesByRole, rolesOf, withRole } from '@/measure/termination-roles.ts'
import { pairFile, terminationFiles, type SweepFile } from '../../support/chosen-files.ts'
import { THREE_TERMINATIONS } from '../../support/transformer-sheet.ts'

const known = {
  ...knownForKit({ positions: [], sealNumber: null }),
  rule: { limits: { minEfficiency: 0.8 } },
}

/** Hands the files over under their names. */
function given(files: readonly SweepFile[]) {
  const answer = makeAnswerer()
  const facts = files.map(({ name, buffer }) =>
    answer['read-file']({ id: name, fileName: name, bytes: new Uint8Array(buffer) }),
  )
  return { answer, facts, ids: files.map(({ name }) => name) }
}

function recognised(files: readonly SweepFile[]) {
  const { answer, ids } = given(files)
  const found = answer.recognise({ ids })
  if (isFailure(found)) throw new Error(found.message)
  return { answer, found, roles: rolesOf(found.assignment, ids) }
}

const NAMED = { open: 'xfm-02_open.s1p', short: 'xfm-02_short.s1p', load: 'xfm-02_load.s1p' }
const UNNAMED = { open: 'a.s1p', short: 'b.s1p', load: 'c.s1p' }

describe('three files that are dropped together', () => {
  it('are told apart by their names, in whatever order they come', () => {
    const [open, short, load] = terminationFiles(NAMED)
    const { found, roles } = recognised([load!, open!, short!])
    expect(found).toMatchObject({ by: 'names', warnings: [] })
    expect(filesByRole(roles)).toEqual(NAMED)
  })

  it('are told apart by their traces when the names say nothing', () => {
    const { found, roles } = recognised(terminationFiles(UNNAMED).reverse())
    expect(found.by).toBe('traces')
    expect(filesByRole(roles)).toEqual(UNNAMED)
  })

  it('with open and short swapped in their names are noticed, and what the traces say is offered', () => {
    const { found } = recognised(terminationFiles({ ...NAMED, open: NAMED.short, short: NAMED.open }))
    expect(found.warnings.map(({ code }) => code)).toEqual(['W_SWAPPED'])
    expect(found.suggestion).toBeDefined()
  })

  it('give the efficiency of the sheet with its uncertainty, by band (calculation sheet, section 4)', () => {
    const { answer, roles } = recognised(terminationFiles(UNNAMED))
    const inputs = { ...filesByRole(roles), loadOhm: 2450, openStrayPf: 0, bands: ['80 m', '40 m', '10 m'] }
    const judged = answer.judge({
      performance: { procedure: 'open-short-load', inputs } as Performance,
      known,
    })
    if (isFailure(judged)) throw new Error(judged.message)
    const points = [THREE_TERMINATIONS[0], THREE_TERMINATIONS[1], THREE_TERMINATIONS[4]]
    expect(judged.findings.map(({ value }) => value?.toFixed(5))).toEqual(
      points.map(({ efficiency }) => efficiency.toFixed(5)),
    )
    expect(judged.findings.map(({ uncertainty }) => uncertainty?.toFixed(4))).toEqual(
      points.map(({ uEfficiency }) => (2 * uEfficiency).toFixed(4)),
    )
  })

  it('change places by hand without one being named twice', () => {
    const roles = { a: 'open', b: 'short', c: 'load' } as const
    expect(withRole(roles, 'a', 'load')).toEqual({ a: 'load', b: 'short', c: 'open' })
    expect(withRole(roles, 'a', 'open')).toEqual(roles)
  })
})

describe('a file', () => {
  it('is recognised: ports, points, range and reference', () => {
    expect(given([pairFile('pair.s2p')]).facts).toEqual([
      { ports: 2, points: 5, fromHz: 3.6e6, toHz: 28.4e6, referenceOhm: [50, 50], notes: [] },
    ])
  })

  it('with a fault is refused with its line, and is not there to be judged', () => {
    const broken = { name: 'x.s1p', mimeType: '', buffer: Buffer.from('# MHz S RI R 50\n7 0.1 0\n7 0.1 0\n') }
    const { answer, facts } = given([broken])
    expect(facts).toEqual([expect.objectContaining({ code: 'TS_FREQ_ORDER', line: 3 })])
    expect(answer.recognise({ ids: ['x.s1p'] })).toMatchObject({ code: 'E_COUNT' })
  })

  it('that was taken out is forgotten', () => {
    const { answer } = given([pairFile('pair.s2p')])
    answer['forget-file']({ id: 'pair.s2p' })
    const inputs = { source: 'file', file: 'pair.s2p', bands: ['40 m'] }
    expect(
      answer.judge({ performance: { procedure: 'pair-loss', inputs } as Performance, known }),
    ).toMatchObject({
      code: 'E_FILE',
    })
  })
})

import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuidv7 } from 'uuid'
import { readPdf, readPdfWords } from '../../support/read-pdf.ts'
import { at, givenItem, givenKit, givenKitKind, type Item, type Kit } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup
let keeper: TestMember
let kit: Kit
let items: Item[]

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Tags', { returnAddress: 'Station 4, Pell Harbor' })
  keeper = await app.givenMember(group, {
    roles: ['quartermaster'],
    name: 'Tobin Arkwell',
    callSign: 'QX0TAR',
  })
  kit = await givenKit(keeper, await givenKitKind(keeper), { designation: 'K-07' })
  items = [
    await givenItem(keeper, 'radio', { designation: 'RAD-10', serial: 'DEMO-1' }),
    await givenItem(keeper, 'radio', { designation: 'RAD-9', ownerId: keeper.memberId }),
  ]
})
afterAll(() => app.close())

const SHEET = { kind: 'sheet', paper: 'a4', size: 'item' }

function print(selection: object, format: object = SHEET, by = keeper) {
  return by
    .post('/api/v1/tag-sheets', { selection, format })
    .buffer(true)
    .parse((res, done) => {
      const chunks: Buffer[] = []
      res.on('data', (chunk: Buffer) => chunks.push(chunk))
      res.on('end', () => done(null, Buffer.concat(chunks)))
    })
}

const problem = (answer: { body: unknown }) =>
  JSON.parse((answer.body as Buffer).toString()) as { code: string; errors?: { pointer: string }[] }
const unprinted = async () => (await keeper.get('/api/v1/tag-sheets/unprinted')).body

describe('printing tags', { timeout: 60_000 }, () => {
  it('answers a PDF whose codes open the things chosen, and names nobody', async () => {
    const answer = await print({ kind: 'chosen', kitIds: [kit.id], itemIds: items.map((item) => item.id) })
    expect(answer.status).toBe(200)
    expect(answer.headers['content-type']).toBe('application/pdf')
    expect(answer.headers['content-disposition']).toContain('attachment')
    const [page] = await readPdf(answer.body as Buffer, 3)
    const tags = [kit, ...items].map((thing) => `HTTP://127.0.0.1:8080/T/${thing.tag}`)
    expect(page!.codes).toEqual(tags.sort())
    const text = page!.words.map((word) => word.text).join(' ')
    for (const part of ['K-07', 'RAD-9', 'Radio', 'If found: Station 4, Pell Harbor'])
      expect(text).toContain(part)
    for (const part of ['Tobin', 'QX0TAR', 'DEMO-1', keeper.email]) expect(text).not.toContain(part)
  })

  it('prints kits first, then items, numbers in their order', async () => {
    const answer = await print({ kind: 'chosen', kitIds: [kit.id], itemIds: items.map((item) => item.id) })
    const [page] = await readPdfWords(answer.body as Buffer)
    const named = page!.words.filter((word) => /^(K|RAD)-/.test(word.text))
    const inRow = [...named].sort((one, other) => one.leftMm - other.leftMm)
    expect(inRow.map((word) => word.text)).toEqual(['K-07', 'RAD-9', 'RAD-10'])
  })

  it('remembers what was printed, so that the rest can be printed next', async () => {
    const other = await givenItem(keeper, 'mast')
    const retired = await givenItem(keeper, 'mast')
    await at(1, keeper.post(`/api/v1/items/${retired.id}/retire`, { reason: 'Bent' })).expect(200)
    expect(await unprinted()).toEqual({ kits: 0, items: 1 })
    const answer = await print({ kind: 'unprinted', of: 'all' })
    const pages = await readPdf(answer.body as Buffer, 1)
    expect(pages.map((page) => page.codes)).toEqual([[`HTTP://127.0.0.1:8080/T/${other.tag}`]])
    expect(await unprinted()).toEqual({ kits: 0, items: 0 })
    const again = await print({ kind: 'unprinted', of: 'items' })
    expect([again.status, problem(again).code]).toEqual([409, 'state-conflict'])
  })

  it('writes what was printed into the audit log', async () => {
    const rows = await app.inGroup(group, (tx) =>
      tx.sql<{ summary: string; member_id: string }>({
        name: 'printed',
        text: `SELECT summary, member_id FROM audit_event WHERE action = 'tags-printed' ORDER BY id LIMIT 1`,
      }),
    )
    expect(rows).toEqual([{ summary: 'printed 3 tags', member_id: keeper.memberId }])
  })

  it('starts at the cell that is free and refuses one that the sheet does not have', async () => {
    const chosen = { kind: 'chosen', itemIds: [items[0]!.id] }
    const last = await print(chosen, { ...SHEET, startCell: 24 })
    const [page] = await readPdfWords(last.body as Buffer)
    expect(page!.words.find((word) => word.text === 'RAD-10')!.leftMm).toBeGreaterThan(140)
    const beyond = await print(chosen, { ...SHEET, startCell: 25 })
    expect([beyond.status, problem(beyond).errors?.[0]?.pointer]).toEqual([422, '#/format/startCell'])
  })

  it.each([
    ['an empty choice', { kind: 'chosen' }, SHEET, '#/selection'],
    ['an unknown paper', { kind: 'unprinted', of: 'all' }, { ...SHEET, paper: 'a3' }, '#/format/paper'],
    [
      'a roll too narrow',
      { kind: 'unprinted', of: 'all' },
      { kind: 'roll', widthMm: 10, heightMm: 30 },
      '#/format/widthMm',
    ],
    [
      'a thing twice',
      { kind: 'chosen', kitIds: ['0', '0'].map(() => '01890000-0000-7000-8000-000000000000') },
      SHEET,
      '#/selection/kitIds',
    ],
  ])('refuses %s', async (_what, selection, format, pointer) => {
    const answer = await print(selection, format)
    expect([answer.status, problem(answer).errors?.[0]?.pointer]).toEqual([422, pointer])
  })

  it('prints nothing when one of the things does not exist in the group (P12)', async () => {
    const stranger = await app.givenMember(await app.givenGroup('Other'), { roles: ['quartermaster'] })
    for (const id of [items[0]!.id, uuidv7()]) {
      const answer = await print({ kind: 'chosen', itemIds: [id] }, SHEET, stranger)
      expect([answer.status, problem(answer).code]).toEqual([404, 'not-found'])
    }
    expect((await stranger.get('/api/v1/tag-sheets/unprinted')).body).toEqual({ kits: 0, items: 0 })
  })

  it('refuses more than 2,000 tags', async () => {
    const crowd = await app.givenGroup('Crowd')
    const crowded = await app.givenMember(crowd, { roles: ['quartermaster'] })
    await app.inGroup(crowd, (tx) =>
      tx.sql(
        {
          name: 'crowd',
          text: `INSERT INTO item (id, group_id, tag, designation, category, details, created_at)
            SELECT gen_random_uuid(), $1, 'T' || n, 'I-' || n, 'mast', '{}', now() FROM generate_series(1, 2001) n`,
        },
        [crowd.id],
      ),
    )
    const answer = await print({ kind: 'unprinted', of: 'items' }, SHEET, crowded)
    expect([answer.status, problem(answer).errors?.[0]?.pointer]).toEqual([422, '#/selection'])
    expect((await crowded.get('/api/v1/tag-sheets/unprinted')).body.items).toBe(2001)
  })

  it('is for the keepers of the registry', async () => {
    const volunteer = await app.givenMember(group)
    expect((await print({ kind: 'unprinted', of: 'all' }, SHEET, volunteer)).status).toBe(403)
  })
})

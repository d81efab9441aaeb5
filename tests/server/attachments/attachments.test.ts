/** Files of tests (promises P16, P26): what is taken, what comes back, and to whom. */
import sharp from 'sharp'
import { v7 as uuidv7 } from 'uuid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { tidyUp } from '#server/services/housekeeping.ts'
import { inspection, newTestId, recorded } from '../../support/evidence.ts'
import { givenItem, type Item } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'
import { download, upload, uploaded } from '../../support/uploads.ts'

let app: TestApp
let member: TestMember
let stranger: TestMember
let observer: TestMember
let radio: Item

beforeAll(async () => {
  app = await startTestApp()
  const group = await app.givenGroup('Ridge Group')
  member = await app.givenMember(group, { roles: ['quartermaster'] })
  observer = await app.givenMember(group, { roles: ['observer'] })
  stranger = await app.givenMember(await app.givenGroup('Valley Group'))
  radio = await givenItem(member, 'radio')
})
afterAll(() => app.close())

const SWEEP = '! a comment with ümlaut\r\n# MHz S RI R 50\r\n7 0.1 0\r\n7.1 0.2 0.05\r\n'
const PDF = '%PDF-1.4\n1 0 obj<</Type/Catalog>>endobj\ntrailer<</Root 1 0 R>>\n%%EOF\n'
const CSV = 'time,temperature\n0,21.5\n60,25\n'

const picture = (format: 'jpeg' | 'png' | 'webp') =>
  sharp({ create: { width: 60, height: 40, channels: 3, background: '#884422' } })
    .withExif({ IFD0: { Artist: 'who held the camera' }, IFD3: { GPSLatitude: '51/1 0/1 0/1' } })
    .toFormat(format)
    .toBuffer()

describe('an upload', () => {
  it('answers what is kept, and the download is the file byte for byte', async () => {
    const sent = Buffer.from(SWEEP)
    const { id, status, body } = await upload(app, member, {
      kind: 'touchstone',
      bytes: sent,
      name: 'ant.s1p',
    })
    expect(status).toBe(200)
    expect(body).toMatchObject({ id, kind: 'touchstone', name: 'ant.s1p', bytes: sent.length })
    expect((await member.get(`/api/v1/attachments/${id}`).expect(200)).body).toEqual(body)
    expect((await download(app, member, id)).bytes.equals(sent)).toBe(true)
  })

  it('is the same success when the same bytes come again, and refused when other bytes do', async () => {
    const first = await upload(app, member, { kind: 'touchstone', bytes: SWEEP, name: 'a.s1p' })
    const again = await upload(app, member, { kind: 'touchstone', bytes: SWEEP, name: 'b.s1p', id: first.id })
    expect(again).toEqual(first)
    const other = await upload(app, member, { kind: 'touchstone', bytes: `${SWEEP}7.2 0 0\n`, id: first.id })
    expect([other.status, other.body.code]).toEqual([409, 'id-taken'])
    const asCsv = await upload(app, member, { kind: 'csv', bytes: CSV, id: first.id })
    expect(asCsv.status).toBe(409)
  })

  it('is stored once when two tries race', async () => {
    const id = uuidv7()
    const tries = Array.from({ length: 6 }, () => upload(app, member, { kind: 'csv', bytes: CSV, id }))
    expect((await Promise.all(tries)).map(({ status }) => status)).toEqual([200, 200, 200, 200, 200, 200])
    const rows: unknown[] = await app.inGroup({ id: member.groupId }, (tx) =>
      tx.manager.query('SELECT 1 FROM attachment WHERE id = $1', [id]),
    )
    expect(rows).toHaveLength(1)
  })

  it.each([
    ['csv', CSV, 'text/csv; charset=utf-8'],
    ['certificate', PDF, 'application/pdf'],
  ] as const)('of a %s comes back as it was sent', async (kind, bytes, type) => {
    const id = await uploaded(app, member, { kind, bytes })
    const back = await download(app, member, id)
    expect([back.bytes.toString(), back.headers.get('Content-Type')]).toEqual([bytes, type])
  })

  it.each(['jpeg', 'png', 'webp'] as const)(
    'of a %s photo comes back as a clean JPEG, nothing of the camera in it (P26)',
    async (format) => {
      const sent = await picture(format)
      expect((await sharp(sent).metadata()).exif).toBeDefined()
      const id = await uploaded(app, member, { kind: 'photo', bytes: sent, name: 'IMG_0001.HEIC' })
      const back = await download(app, member, id)
      const seen = await sharp(back.bytes).metadata()
      expect(seen).toMatchObject({ format: 'jpeg', width: 60, height: 40 })
      expect([seen.exif, seen.xmp, seen.iptc]).toEqual([undefined, undefined, undefined])
      expect(back.bytes.includes('camera')).toBe(false)
      expect(back.headers.get('Content-Disposition')).toBe('attachment; filename=IMG_0001.jpg')
    },
  )

  it('of a large photo is scaled for the page and turned upright', async () => {
    const sent = await sharp({ create: { width: 4000, height: 3000, channels: 3, background: '#335577' } })
      .withMetadata({ orientation: 6 })
      .jpeg()
      .toBuffer()
    const id = await uploaded(app, member, { kind: 'photo', bytes: sent })
    const { width, height } = await sharp((await download(app, member, id)).bytes).metadata()
    expect([width, height]).toEqual([1920, 2560])
  })

  it('shows a name as one line and never as a path', async () => {
    const name = '../../etc/pa\u202Esswd\u0000.s1p'
    const { body } = await upload(app, member, { kind: 'touchstone', bytes: SWEEP, name })
    expect(body.name).toBe('passwd.s1p')
  })

  it('keeps a name on one line and its characters whole where it is cut', async () => {
    const broken = await upload(app, member, { kind: 'csv', bytes: CSV, name: 'two\u2028lines\u2029.csv' })
    expect(broken.body.name).toBe('twolines.csv')
    const long = `${'a'.repeat(114)}\u{1F4FB}${'b'.repeat(20)}.csv`
    const { body } = await upload(app, member, { kind: 'csv', bytes: CSV, name: long })
    expect(body.name).toBe(`${'a'.repeat(114)}….csv`)
  })
})

describe('a download', () => {
  it('is saved, not shown, and can do nothing where it is shown all the same (P26)', async () => {
    const { headers } = await download(app, member, await uploaded(app, member, { kind: 'csv', bytes: CSV }))
    expect(headers.get('Content-Disposition')).toMatch(/^attachment; filename=file\.csv$/)
    expect(headers.get('X-Content-Type-Options')).toBe('nosniff')
    expect(headers.get('Content-Security-Policy')).toBe("default-src 'none'; sandbox")
    expect(headers.get('Cache-Control')).toBe('no-store')
  })

  it('is for members of the group alone (P16)', async () => {
    const id = await uploaded(app, member, { kind: 'csv', bytes: CSV })
    expect((await download(app, stranger, id)).status).toBe(404)
    await stranger.get(`/api/v1/attachments/${id}`).expect(404)
    expect((await download(app, observer, id)).status).toBe(403)
    expect((await download(app, app.request(), id)).status).toBe(401)
    const taken = await upload(app, stranger, { kind: 'csv', bytes: CSV, id })
    expect(taken.status).toBe(409)
  })
})

describe('a file that no test names', () => {
  it('is removed after a day, and one that a test names is kept', async () => {
    const [unused, used] = await Promise.all([
      uploaded(app, member, { kind: 'csv', bytes: CSV }),
      uploaded(app, member, { kind: 'photo', bytes: await picture('png') }),
    ])
    const body = { ...inspection(radio.id, app.clock.now().toISOString()), attachmentIds: [used] }
    const test = await recorded(member, body, newTestId())
    expect(test.attachments).toMatchObject([{ id: used, role: 'attached', kind: 'photo' }])
    await tidyUp(app.ctx)
    expect((await download(app, member, unused)).status).toBe(200)
    app.clock.advance(25, 'hours')
    await tidyUp(app.ctx)
    expect((await download(app, member, unused)).status).toBe(404)
    expect((await download(app, member, used)).status).toBe(200)
  })
})

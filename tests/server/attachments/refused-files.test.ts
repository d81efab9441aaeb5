/** "Uploads are what they say" (promise P26): all else is refused, nothing is half stored, no input makes a 5xx (P23). */
import { readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import sharp from 'sharp'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { ATTACHMENT_BYTES, MAX_CSV_ROWS, type AttachmentKind } from '#shared/contracts/attachments.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'
import { download, upload } from '../../support/uploads.ts'

let app: TestApp
let member: TestMember

beforeAll(async () => {
  app = await startTestApp()
  member = await app.givenMember(await app.givenGroup('Ridge Group'))
})
afterAll(async () => {
  const [{ n }] = await app.ctx.db.query<[{ n: number }]>('SELECT count(*)::int AS n FROM attachment')
  expect(n).toBe(0)
  await app.close()
})

/** Refused with a problem that names the fault, and there is nothing to download. */
async function refused(kind: AttachmentKind, bytes: Uint8Array | string, name?: string) {
  const startedAt = performance.now()
  const { id, status, body } = await upload(app, member, { kind, bytes, ...(name !== undefined && { name }) })
  expect(performance.now() - startedAt).toBeLessThan(5000)
  expect([413, 415, 422]).toContain(status)
  expect(JSON.stringify(body)).not.toMatch(/node_modules|SELECT |\.ts:\d|vips/i)
  expect((await download(app, member, id)).status).toBe(404)
  return { status, detail: body.detail ?? '', faults: body.errors?.map(({ detail }) => detail) ?? [] }
}

const HOSTILE = join(import.meta.dirname, '../../fixtures/touchstone/hostile')

describe('a Touchstone file (P26)', () => {
  it.each(readdirSync(HOSTILE))('that is %s is refused', async (name) => {
    const { status, faults } = await refused('touchstone', readFileSync(join(HOSTILE, name)), name)
    expect(status).toBe(422)
    expect(faults).toHaveLength(1)
  })

  it('is refused with the line of its fault', async () => {
    const { detail } = await refused('touchstone', '# MHz S RI R 50\n7 0.1 0\n7 0.1 0\n', 'a.s1p')
    expect(detail).toMatch(/^Line 3: .*TS_FREQ_ORDER/)
  })

  it('of more than 20,001 points is refused with the limit', async () => {
    const lines = Array.from({ length: 20_002 }, (_, n) => `${n + 1} 0.1 0`)
    const { detail } = await refused('touchstone', `# kHz S RI R 50\n${lines.join('\n')}\n`, 'a.s1p')
    expect(detail).toContain('20001')
  })

  it('of more than 2 MiB is refused before it is read', async () => {
    const { status } = await refused('touchstone', '!'.repeat(ATTACHMENT_BYTES.touchstone + 1))
    expect(status).toBe(413)
    expect((await refused('touchstone', '!'.repeat(12 * 1024 * 1024))).status).toBe(413)
  })
})

describe('a CSV (P26)', () => {
  const rows = (count: number) => Array.from({ length: count }, (_, n) => `${n},21`).join('\n')

  it.each([
    ['empty', '', 422],
    ['of a heading only', 'time,temperature\n', 422],
    ['UTF-16', Buffer.from('time,temperature\n0,1\n', 'utf16le'), 415],
    ['Latin-1', Buffer.from('time,température\n0,1\n', 'latin1'), 415],
    ['with a NUL', 'a,b\n1,\u00002\n', 415],
    ['packed', Buffer.from('1f8b0800000000000003', 'hex'), 415],
    ['a spreadsheet', Buffer.from('504b030414000600080000002100', 'hex'), 415],
    ['of one long cell', `a,b\n1,"${'x'.repeat(1_500_000)}"\n`, 422],
    ['of too many rows', `a,b\n${rows(MAX_CSV_ROWS + 1)}`, 422],
    ['of too many columns', `${'a,'.repeat(200)}b\n${'1,'.repeat(200)}2\n`, 422],
  ] as const)('that is %s is refused', async (_, bytes, status) => {
    expect((await refused('csv', bytes)).status).toBe(status)
  })

  it('is refused with all of its faults by line', async () => {
    const { faults } = await refused('csv', 'time,temperature\n0,21\n60\n120,25\n180,26,27\n')
    expect(faults).toEqual(['Line 3: 1 columns instead of 2.', 'Line 5: 3 columns instead of 2.'])
  })

  it('is refused with the line of a quote that is never closed', async () => {
    expect((await refused('csv', 'a,b\n1,2\n3,"4\n5,6\n')).detail).toMatch(/^Line \d/)
  })
})

const huge = (width: number, height: number) =>
  sharp({ create: { width, height, channels: 3, background: '#000' }, limitInputPixels: false })
    .png({ compressionLevel: 9 })
    .toBuffer()

/** The size in the header says more than the data holds. */
async function lying(width: number): Promise<Buffer> {
  const png = await huge(10, 10)
  png.writeUInt32BE(width, 16)
  return png
}

describe('a photo (P26)', () => {
  it.each([
    ['text', 'not a picture'],
    ['SVG', '<svg xmlns="http://www.w3.org/2000/svg"><script>alert(1)</script></svg>'],
    ['HTML that says it is a PNG', '<html><img src=x onerror=alert(1)></html>'],
    ['a GIF', Buffer.from('47494638396101000100800000000000ffffff2c00000000010001000002024401003b', 'hex')],
    ['a TIFF', Buffer.from('49492a0008000000', 'hex')],
    ['a PDF', '%PDF-1.4\n%%EOF'],
    ['a program', Buffer.from('7f454c4602010100', 'hex')],
    ['a drawing script', 'push graphic-context\nviewbox 0 0 1 1\nfill url(https://example.org/)'],
    ['an archive', Buffer.from('504b0304', 'hex')],
    ['HEIF', Buffer.from('000000186674797068656963', 'hex')],
  ] as const)('that is %s is refused by its content', async (_, bytes) => {
    expect((await refused('photo', bytes, 'picture.png')).status).toBe(415)
  })

  it('that is cut, damaged or a mere beginning is refused', async () => {
    const jpeg = await sharp({ create: { width: 400, height: 300, channels: 3, background: '#a40' } })
      .jpeg()
      .toBuffer()
    const png = await huge(40, 40)
    const damaged = Buffer.from(png)
    const inData = damaged.indexOf('IDAT') + 8
    damaged.writeUInt8(damaged.readUInt8(inData) ^ 0xff, inData)
    for (const bytes of [
      jpeg.subarray(0, 200),
      jpeg.subarray(0, jpeg.length / 2),
      png.subarray(0, 30),
      damaged,
    ])
      expect((await refused('photo', bytes)).status).toBe(422)
  })

  it('of more than 50 megapixels is refused, whatever it weighs', { timeout: 60_000 }, async () => {
    const { detail } = await refused('photo', await huge(12_000, 12_000))
    expect(detail).toContain('50 megapixels')
    expect((await refused('photo', await lying(40_000))).status).toBe(422)
    expect((await refused('photo', await lying(0))).status).toBe(422)
  })

  it('of more than 10 MiB is refused', async () => {
    expect((await refused('photo', Buffer.alloc(ATTACHMENT_BYTES.photo + 1, 0xff))).status).toBe(413)
  })
})

describe('a certificate', () => {
  it.each([
    ['text', 'calibrated', 415],
    ['cut off', `%PDF-1.7\n${'x'.repeat(4000)}`, 422],
    ['a PDF that runs a script', '%PDF-1.7\n<</S/JavaScript/JS(app.alert(1))>>\n%%EOF', 422],
    ['a PDF that starts a program', '%PDF-1.7\n<</S/Launch>>\n%%EOF', 422],
    ['a PDF that carries files', '%PDF-1.7\n<</Type/EmbeddedFile>>\n%%EOF', 422],
  ] as const)('that is %s is refused', async (_, bytes, status) => {
    expect((await refused('certificate', bytes)).status).toBe(status)
  })
})

it('a polyglot is taken for the picture that it is, and comes back without the rest (P26)', async () => {
  const jpeg = await sharp({ create: { width: 40, height: 30, channels: 3, background: '#a40' } })
    .jpeg()
    .toBuffer()
  const sent = Buffer.concat([jpeg, Buffer.from('PK\u0003\u0004<script>alert(1)</script>%PDF-1.4')])
  const { id, status } = await upload(app, member, { kind: 'photo', bytes: sent })
  expect(status).toBe(200)
  expect((await download(app, member, id)).bytes.includes('script')).toBe(false)
  await app.inGroup({ id: member.groupId }, (tx) =>
    tx.manager.query('DELETE FROM attachment WHERE id = $1', [id]),
  )
})

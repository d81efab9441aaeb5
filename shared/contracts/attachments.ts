import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id, newId } from './fields.ts'
import { CREW } from './roles.ts'
import { answeredAt } from './words.ts'

/** Files that belong to tests. What a file is, is told by its content; its name is only shown. */
export const ATTACHMENT_KINDS = ['touchstone', 'csv', 'photo', 'certificate'] as const
export type AttachmentKind = (typeof ATTACHMENT_KINDS)[number]

const MIB = 1024 * 1024

/** The largest file of each kind, bytes (promise P26). */
export const ATTACHMENT_BYTES: Readonly<Record<AttachmentKind, number>> = {
  touchstone: 2 * MIB,
  csv: 2 * MIB,
  photo: 10 * MIB,
  certificate: 10 * MIB,
}

export const MAX_CSV_ROWS = 5000
export const MAX_PIXELS = 50_000_000
/** The most that one test takes beside the files it is read from. */
export const MAX_ATTACHMENTS = 10

const kind = z.enum(ATTACHMENT_KINDS)

export const attachmentRecord = z.object({
  id: z.string(),
  kind,
  /** As the device called it; shown and never relied upon. */
  name: z.string(),
  /** Of the bytes that a download gives: a photo is a JPEG whatever was sent. */
  mediaType: z.string(),
  /** Size of a download. */
  bytes: z.int(),
  uploadedAt: answeredAt,
})

/** A file of a test and what it is there for. */
export const testAttachment = attachmentRecord.extend({
  /** `file`, `open`, `short`, `load`: the test is read from it; `attached`: beside the readings. */
  role: z.enum(['file', 'open', 'short', 'load', 'attached']),
})

/**
 * The client makes the id. The same bytes under it again are the same success; other bytes are `id-taken`. A file
 * that no test names within a day is removed.
 */
export const uploadAttachment = defineEndpoint({
  name: 'upload-attachment',
  method: 'put',
  path: '/api/v1/attachments/:attachmentId',
  summary: 'Upload one file as multipart/form-data, field "file"; its content is checked',
  access: { scope: 'group', roles: CREW },
  params: z.strictObject({ attachmentId: newId }),
  query: z.strictObject({ kind }),
  upload: true,
  response: attachmentRecord,
  problems: ['request-invalid', 'id-taken', 'body-too-large', 'content-type-refused'],
})

export const readAttachment = defineEndpoint({
  name: 'read-attachment',
  method: 'get',
  path: '/api/v1/attachments/:attachmentId',
  summary: 'What is known about a file',
  access: { scope: 'group', roles: CREW },
  params: z.strictObject({ attachmentId: id }),
  response: attachmentRecord,
})

export const downloadAttachment = defineEndpoint({
  name: 'download-attachment',
  method: 'get',
  path: '/api/v1/attachments/:attachmentId/content',
  summary: 'The file itself, byte for byte; of a photo the picture without what the camera wrote beside it',
  access: { scope: 'group', roles: CREW },
  params: z.strictObject({ attachmentId: id }),
  media: 'application/octet-stream',
})

export type AttachmentRecord = z.output<typeof attachmentRecord>
export type TestAttachment = z.output<typeof testAttachment>

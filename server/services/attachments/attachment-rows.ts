import type { AttachmentKind, AttachmentRecord } from '#shared/contracts/attachments.ts'
import { notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'

export interface AttachmentRow {
  [column: string]: unknown
  id: string
  kind: AttachmentKind
  name: string
  media_type: string
  size: number
  sent_sha256: Buffer
  uploaded_at: Date
}

export const ATTACHMENT_COLUMNS = 'a.id, a.kind, a.name, a.media_type, a.size, a.sent_sha256, a.uploaded_at'

const READ: Statement = {
  name: 'read-attachment',
  text: `SELECT ${ATTACHMENT_COLUMNS} FROM attachment a WHERE a.group_id = $1 AND a.id = $2`,
}
const CONTENT: Statement = {
  name: 'attachment-content',
  text: `SELECT ${ATTACHMENT_COLUMNS}, a.content FROM attachment a WHERE a.group_id = $1 AND a.id = $2`,
}

export async function findAttachment(tx: GroupTx, id: string): Promise<AttachmentRow | undefined> {
  return (await tx.sql<AttachmentRow>(READ, [tx.groupId, id]))[0]
}

export async function readAttachmentOf(tx: GroupTx, id: string): Promise<AttachmentRecord> {
  const row = await findAttachment(tx, id)
  if (!row) throw notFound('file')
  return attachmentOf(row)
}

export async function readContent(
  tx: GroupTx,
  id: string,
): Promise<AttachmentRow & { readonly content: Buffer }> {
  const [row] = await tx.sql<AttachmentRow & { content: Buffer }>(CONTENT, [tx.groupId, id])
  if (!row) throw notFound('file')
  return row
}

export function attachmentOf(row: AttachmentRow): AttachmentRecord {
  const { id, kind, name, media_type: mediaType, size: bytes, uploaded_at: uploadedAt } = row
  return { id, kind, name, mediaType, bytes, uploadedAt: uploadedAt.toISOString() }
}

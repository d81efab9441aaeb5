import { createHash } from 'node:crypto'
import type { AttachmentKind, AttachmentRecord } from '#shared/contracts/attachments.ts'
import type { Caller } from '../../caller.ts'
import type { AppContext } from '../../context.ts'
import { inGroup, type GroupTx, type Statement } from '../../group-transaction.ts'
import type { UploadedFile } from '../../middleware/read-upload.ts'
import { record } from '../audit.ts'
import { idTaken } from '../registry/duplicates.ts'
import { attachmentOf, findAttachment, type AttachmentRow } from './attachment-rows.ts'
import { checkFile } from './check-file.ts'
import type { CheckedFile } from './checked-file.ts'
import { shownName } from './shown-name.ts'

interface Upload {
  readonly by: Pick<Caller, 'groupId' | 'memberId' | 'actor'>
  readonly attachmentId: string
  readonly kind: AttachmentKind
  readonly file: UploadedFile
}

/**
 * Stores a file that is what it says. The same bytes under the same id are the same success, also when two tries race;
 * other bytes are `id-taken`. A picture is decoded before the transaction begins, so that it holds no connection.
 */
export async function uploadAttachment(ctx: AppContext, upload: Upload): Promise<AttachmentRecord> {
  const sent = createHash('sha256').update(upload.file.bytes).digest()
  const scope = { groupId: upload.by.groupId, actor: upload.by.actor }
  const known = await inGroup(ctx, scope, (tx) => findAttachment(tx, upload.attachmentId))
  if (known) return sameAgain(known, upload.kind, sent)
  const name = shownName(upload.file.name)
  const checked = await checkFile(upload.kind, { name, bytes: upload.file.bytes })
  return inGroup(ctx, scope, (tx) => store(tx, { ...upload, name, sent, checked }))
}

interface Storing extends Upload {
  readonly name: string
  readonly sent: Buffer
  readonly checked: CheckedFile
}

const INSERT: Statement = {
  name: 'insert-attachment',
  text: `INSERT INTO attachment
      (id, group_id, kind, name, media_type, size, sent_sha256, content, uploaded_at, uploaded_by)
    VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10) ON CONFLICT (id) DO NOTHING RETURNING id`,
}

async function store(tx: GroupTx, storing: Storing): Promise<AttachmentRecord> {
  const { attachmentId: id, kind, name, sent, checked, by } = storing
  const { content, mediaType } = checked
  const values = [id, tx.groupId, kind, name, mediaType, content.length, sent, content, tx.now, by.memberId]
  const [isNew] = await tx.sql(INSERT, values)
  const row = await findAttachment(tx, id)
  // Taken, and not to be seen from this group: another group's.
  if (!row) throw idTaken()
  if (!isNew) return sameAgain(row, kind, sent)
  const summary = `uploaded the file ${name}`
  await record(tx, { action: 'file-uploaded', subjectType: 'attachment', subjectId: id, summary })
  return attachmentOf(row)
}

function sameAgain(known: AttachmentRow, kind: AttachmentKind, sent: Buffer): AttachmentRecord {
  if (known.kind === kind && known.sent_sha256.equals(sent)) return attachmentOf(known)
  throw idTaken()
}

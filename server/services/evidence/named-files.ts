import type { RecordTestBody } from '#shared/contracts/record-test.ts'
import type { TestAttachment } from '#shared/contracts/attachments.ts'
import { filesNamed, type FileSource, type FileSources } from '#shared/engine/procedures/test-files.ts'
import { AppError } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { ATTACHMENT_COLUMNS, attachmentOf, type AttachmentRow } from '../attachments/attachment-rows.ts'

/** A file and the part that it plays in a test. */
export interface FileLink {
  readonly id: string
  readonly role: TestAttachment['role']
}

export interface NamedFiles {
  readonly links: readonly FileLink[]
  /** Bytes of the files that the test is read from. */
  readonly sources: FileSources
}

interface FileRow {
  [column: string]: unknown
  id: string
  kind: string
  name: string
  content: Buffer | null
}

const NAMED: Statement = {
  name: 'files-of-new-test',
  text: `SELECT id, kind, name, CASE WHEN id = ANY($3::uuid[]) THEN content END AS content
    FROM attachment WHERE group_id = $1 AND id = ANY($2::uuid[])`,
}

/** The files that a test names; a fault of the field when one is not in the group or of the wrong kind. */
export async function namedFiles(tx: GroupTx, body: RecordTestBody): Promise<NamedFiles> {
  const read = filesNamed(body)
  const readIds = read.map(({ id }) => id)
  const beside = (body.attachmentIds ?? []).filter((id) => !readIds.includes(id))
  if (read.length + beside.length === 0) return { links: [], sources: {} }
  const rows = await tx.sql<FileRow>(NAMED, [tx.groupId, [...readIds, ...beside], readIds])
  const byId = new Map(rows.map((row) => [row.id, row]))
  const faults = [
    ...read.flatMap(({ id, role }) => fault(`#/inputs/${role}`, byId.get(id), true)),
    ...beside.flatMap((id) => fault(pointerBeside(body, id), byId.get(id), false)),
  ]
  if (faults.length > 0)
    throw new AppError('request-invalid', 'A file that the test names cannot be taken. Nothing was saved.', {
      errors: faults,
    })
  return {
    links: [...read, ...beside.map((id) => ({ id, role: 'attached' as const }))],
    sources: Object.fromEntries(rows.flatMap(sourceOf)),
  }
}

function pointerBeside({ attachmentIds = [] }: RecordTestBody, id: string): string {
  return `#/attachmentIds/${attachmentIds.indexOf(id)}`
}

function fault(pointer: string, row: FileRow | undefined, isRead: boolean) {
  if (!row)
    return [{ pointer, detail: 'There is no such file in your group, or it was removed: upload it again.' }]
  if (isRead && row.kind !== 'touchstone')
    return [{ pointer, detail: `${row.name} is no Touchstone file, which this test is read from.` }]
  return []
}

const sourceOf = ({ id, name, content }: FileRow): [string, FileSource][] =>
  content === null ? [] : [[id, { fileName: name, bytes: content }]]

/** The bytes of files by their ids, such as those of a baseline. */
export async function fileSources(tx: GroupTx, ids: readonly string[]): Promise<FileSources> {
  if (ids.length === 0) return {}
  return Object.fromEntries((await tx.sql<FileRow>(NAMED, [tx.groupId, ids, ids])).flatMap(sourceOf))
}

const LINK: Statement = {
  name: 'link-test-files',
  text: `INSERT INTO test_attachment (test_id, attachment_id, group_id, role, ordinal)
    SELECT $1, id, $2, role, n - 1 FROM unnest($3::uuid[], $4::text[]) WITH ORDINALITY AS f (id, role, n)`,
}

export async function linkFiles(tx: GroupTx, testId: string, links: readonly FileLink[]): Promise<void> {
  if (links.length === 0) return
  await tx.sql(LINK, [testId, tx.groupId, links.map(({ id }) => id), links.map(({ role }) => role)])
}

interface LinkedRow extends AttachmentRow {
  role: TestAttachment['role']
}

const OF_TEST: Statement = {
  name: 'files-of-test',
  text: `SELECT ${ATTACHMENT_COLUMNS}, t.role FROM test_attachment t JOIN attachment a ON a.id = t.attachment_id
    WHERE t.group_id = $1 AND t.test_id = $2 ORDER BY t.ordinal`,
}

export async function filesOfTest(tx: GroupTx, testId: string): Promise<TestAttachment[]> {
  const rows = await tx.sql<LinkedRow>(OF_TEST, [tx.groupId, testId])
  return rows.map((row) => ({ ...attachmentOf(row), role: row.role }))
}

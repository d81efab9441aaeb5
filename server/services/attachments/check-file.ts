import type { AttachmentKind } from '#shared/contracts/attachments.ts'
import type { UploadedFile } from '../../middleware/read-upload.ts'
import { checkCertificate } from './check-certificate.ts'
import { checkCsv } from './check-csv.ts'
import { checkTouchstone } from './check-touchstone.ts'
import { fileFault, type CheckedFile } from './checked-file.ts'
import { cleanPhoto } from './clean-photo.ts'

/** What a file of a kind must be, told by its content. @throws AppError 415 or 422 with the line where there is one. */
export async function checkFile(kind: AttachmentKind, { bytes, name }: UploadedFile): Promise<CheckedFile> {
  if (bytes.length === 0) throw fileFault('The file is empty.')
  switch (kind) {
    case 'touchstone':
      return checkTouchstone(bytes, name)
    case 'csv':
      return checkCsv(bytes)
    case 'certificate':
      return checkCertificate(bytes)
    case 'photo':
      return cleanPhoto(bytes)
  }
}

import {
  ATTACHMENT_BYTES,
  downloadAttachment,
  readAttachment,
  uploadAttachment as uploadContract,
} from '#shared/contracts/attachments.ts'
import type { AppContext } from '../context.ts'
import { inGroup } from '../group-transaction.ts'
import { readUpload } from '../middleware/read-upload.ts'
import { readAttachmentOf, readContent } from '../services/attachments/attachment-rows.ts'
import { uploadAttachment } from '../services/attachments/upload-attachment.ts'
import { ANSWERED, type EndpointRouter } from './endpoint.ts'

export function attachmentRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(uploadContract, async ({ params: { attachmentId }, query: { kind }, by, req, res }) => {
    const file = await readUpload(req, res, ATTACHMENT_BYTES[kind])
    return uploadAttachment(ctx, { by, attachmentId, kind, file })
  })
  endpoints.add(readAttachment, ({ params, by }) =>
    inGroup(ctx, by, (tx) => readAttachmentOf(tx, params.attachmentId)),
  )
  endpoints.add(downloadAttachment, async ({ params, by, res }) => {
    const {
      name,
      media_type: mediaType,
      kind,
      content,
    } = await inGroup(ctx, by, (tx) => readContent(tx, params.attachmentId))
    // Saved rather than shown, and harmless where a browser shows it all the same (promise P26).
    res.attachment(kind === 'photo' ? name.replace(/\.[^.]*$/, '') + '.jpg' : name)
    res.set('Content-Type', mediaType)
    res.set('Content-Security-Policy', "default-src 'none'; sandbox")
    res.set('X-Content-Type-Options', 'nosniff')
    res.set('Cache-Control', 'no-store')
    res.end(content)
    return ANSWERED
  })
}

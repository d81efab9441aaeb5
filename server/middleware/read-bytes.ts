import type { Request } from 'express'
import { AppError } from '../errors.ts'

/**
 * The bytes of a body up to a limit. Beyond it the promise is rejected at once: what is still to come is not read, as
 * the usual parsers would, which wait for the end of it before they answer (promise P25).
 * @throws AppError `body-too-large`; `request-malformed` when the client goes away before the end.
 */
export function readBytes(req: Request, limitBytes: number): Promise<Buffer> {
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = []
    let length = 0
    const take = (chunk: Buffer) => {
      length += chunk.length
      if (length <= limitBytes) return void chunks.push(chunk)
      req.off('data', take)
      req.pause()
      reject(new AppError('body-too-large', `At most ${limitBytes / 1024} KiB.`))
    }
    const cut = () => reject(new AppError('request-malformed', 'The body was cut off.'))
    req.on('data', take)
    req.once('end', () => resolve(Buffer.concat(chunks)))
    req.once('error', cut)
    req.once('close', cut)
  })
}

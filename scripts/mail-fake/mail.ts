import { simpleParser, type ParsedMail } from 'mailparser'

/** One delivered message, as tests and the page read it. */
export interface Mail {
  /** The name of its file, without `.eml`: sorts by arrival. */
  id: string
  receivedAt: string
  /** From the envelope: who it was really delivered to. */
  deliveredTo: string[]
  from: string
  subject: string
  messageId: string
  text: string
  html: string
  /** Names in lower case, values as they came. A header given twice: its last. */
  headers: Record<string, string>
}

/** Our own header at the top of a kept file: the envelope is not part of a message. */
const ENVELOPE_HEADER = 'X-Delivered-To'

export function withEnvelope(deliveredTo: readonly string[], message: Buffer): Buffer {
  return Buffer.concat([Buffer.from(`${ENVELOPE_HEADER}: ${deliveredTo.join(', ')}\r\n`), message])
}

/** Reads a kept file; `id` starts with the instant of arrival in milliseconds. */
export async function parseMail(id: string, file: Buffer): Promise<Mail> {
  const parsed = await simpleParser(file, { skipImageLinks: true, skipTextToHtml: true })
  const headers = readHeaders(parsed)
  return {
    id,
    receivedAt: new Date(Number(id.split('-')[0])).toISOString(),
    deliveredTo: (headers[ENVELOPE_HEADER.toLowerCase()] ?? '').split(', '),
    from: parsed.from?.text ?? '',
    subject: parsed.subject ?? '',
    messageId: parsed.messageId ?? '',
    text: parsed.text ?? '',
    html: parsed.html || '',
    headers,
  }
}

function readHeaders({ headerLines }: ParsedMail): Record<string, string> {
  return Object.fromEntries(
    headerLines.map(({ key, line }) => [
      key,
      line
        .slice(line.indexOf(':') + 1)
        .replace(/\r?\n\s+/g, ' ')
        .trim(),
    ]),
  )
}

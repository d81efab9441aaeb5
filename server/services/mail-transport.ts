import nodemailer, { type TransportOptions } from 'nodemailer'

export interface OutgoingMail {
  readonly from: string
  readonly to: string
  readonly subject: string
  readonly text: string
  readonly html: string
  readonly messageId: string
  readonly headers: Record<string, string>
}

export interface MailTransport {
  /** Resolves when the mail server has answered with success; rejects with its answer otherwise. */
  send(mail: OutgoingMail): Promise<void>
  close(): void
}

/** One pooled connection set for the life of the process: a greeting costs more than a mail. */
export function smtpTransport(url: string): MailTransport {
  const pool = nodemailer.createTransport({
    url,
    pool: true,
    maxConnections: 2,
    maxMessages: Infinity,
    connectionTimeout: 5000,
    greetingTimeout: 5000,
    socketTimeout: 15_000,
    disableFileAccess: true,
    disableUrlAccess: true,
  } as TransportOptions)
  return {
    send: async (mail) => {
      await pool.sendMail({ ...mail, to: { name: '', address: mail.to } })
    },
    close: () => pool.close(),
  }
}

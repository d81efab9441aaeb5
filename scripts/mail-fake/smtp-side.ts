import type { AddressInfo, Socket } from 'node:net'
import { SMTPServer, type SMTPServerDataStream, type SMTPServerSession } from 'smtp-server'
import type { MailStore } from './mail-store.ts'

/** How the mail server answers: as it should, or with one of the faults that senders must live with. */
export type MailBehaviour =
  | 'accept'
  /** 451: try again later. */
  | 'defer'
  /** 550: never. */
  | 'refuse'
  /** Takes the message, keeps it, and hangs up without an answer. */
  | 'hang-up-after-data'
  /** Takes connections and says nothing. */
  | 'never-greet'

export interface SmtpSide {
  port: number
  answerWith(behaviour: MailBehaviour): void
  stop(): Promise<void>
}

const REFUSALS = {
  defer: { code: 451, text: 'Try again later.' },
  refuse: { code: 550, text: 'No such mailbox.' },
} as const

export async function startSmtpSide(store: MailStore, port: number): Promise<SmtpSide> {
  let behaviour: MailBehaviour = 'accept'
  const sockets = new Set<Socket>()
  const smtp = new SMTPServer({
    authOptional: true,
    hideSTARTTLS: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    disableReverseLookup: true,
    size: 25 * 1024 * 1024,
    logger: false,
    closeTimeout: 200,
    onConnect: (_session, done) => {
      if (behaviour !== 'never-greet') done()
    },
    onRcptTo: (_address, _session, done) => done(refusal(behaviour)),
    onData: (stream, session, done) => {
      void readAll(stream)
        .then((message) => store.add(recipients(session), message))
        .then(() => (behaviour === 'hang-up-after-data' ? hangUp(sockets, session.remotePort) : done()))
        .catch((error: unknown) => done(error instanceof Error ? error : new Error(String(error))))
    },
  })
  smtp.on('error', () => undefined) // A sender that hung up: it will try again.
  smtp.server.on('connection', (socket: Socket) => {
    sockets.add(socket)
    socket.once('close', () => sockets.delete(socket))
  })
  await listen(smtp, port)
  return {
    port: (smtp.server.address() as AddressInfo).port,
    answerWith: (next) => {
      behaviour = next
    },
    stop: () => close(smtp, sockets),
  }
}

function listen(smtp: SMTPServer, port: number): Promise<void> {
  return new Promise((resolve, reject) => {
    smtp.server.once('error', reject)
    smtp.listen(port, '127.0.0.1', () => resolve())
  })
}

function close(smtp: SMTPServer, sockets: ReadonlySet<Socket>): Promise<void> {
  return new Promise((resolve) => {
    smtp.close(() => resolve())
    for (const socket of sockets) socket.destroy()
  })
}

function refusal(behaviour: MailBehaviour): Error | null {
  if (behaviour !== 'defer' && behaviour !== 'refuse') return null
  const { code, text } = REFUSALS[behaviour]
  return Object.assign(new Error(text), { responseCode: code })
}

function recipients(session: SMTPServerSession): string[] {
  return session.envelope.rcptTo.map(({ address }) => address)
}

async function readAll(stream: SMTPServerDataStream): Promise<Buffer> {
  const chunks: Buffer[] = []
  for await (const chunk of stream) chunks.push(chunk as Buffer)
  if (stream.sizeExceeded) throw Object.assign(new Error('The message is too large.'), { responseCode: 552 })
  return Buffer.concat(chunks)
}

function hangUp(sockets: ReadonlySet<Socket>, remotePort: number): void {
  for (const socket of sockets) if (socket.remotePort === remotePort) socket.destroy()
}

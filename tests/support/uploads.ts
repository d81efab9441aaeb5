/** Uploads and downloads as a browser does them. */
import { v7 as uuidv7 } from 'uuid'
import type { AttachmentKind } from '#shared/contracts/attachments.ts'
import type { TestApp } from './test-app.ts'
import { TEST_ORIGIN, type TestClient } from './test-client.ts'

export interface Sending {
  kind: AttachmentKind
  bytes: Uint8Array | string
  name?: string
  id?: string
}

export interface Answered {
  id: string
  status: number
  body: Record<string, unknown> & { code?: string; detail?: string; errors?: { detail: string }[] }
}

/** One file as multipart/form-data. */
export async function upload(app: TestApp, by: TestClient, sending: Sending): Promise<Answered> {
  const form = new FormData()
  form.set('file', new Blob([sending.bytes as BlobPart]), sending.name ?? `file.${sending.kind}`)
  return send(app, by, { ...sending, body: form })
}

/** A multipart body of the test's own making. */
export async function send(
  app: TestApp,
  by: TestClient,
  { kind, id = uuidv7(), body, headers }: Omit<Sending, 'bytes'> & { body: BodyInit; headers?: HeadersInit },
): Promise<Answered> {
  const response = await fetch(`${app.url}/api/v1/attachments/${id}?kind=${kind}`, {
    method: 'PUT',
    headers: { Origin: TEST_ORIGIN, Cookie: by.cookie ?? '', ...headers } as HeadersInit,
    body,
  })
  return { id, status: response.status, body: (await response.json()) as Answered['body'] }
}

/** Uploads what must be taken and answers its id. */
export async function uploaded(app: TestApp, by: TestClient, sending: Sending): Promise<string> {
  const { id, status, body } = await upload(app, by, sending)
  if (status !== 200) throw new Error(`${status} ${JSON.stringify(body)}`)
  return id
}

export async function download(app: TestApp, by: TestClient, id: string) {
  const response = await fetch(`${app.url}/api/v1/attachments/${id}/content`, {
    headers: { Cookie: by.cookie ?? '' },
  })
  return {
    status: response.status,
    headers: response.headers,
    bytes: Buffer.from(await response.arrayBuffer()),
  }
}

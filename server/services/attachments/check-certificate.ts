import { fileFault, otherKind, type CheckedFile } from './checked-file.ts'

/** What a certificate has no use for and a reader would act on. ISO 32000-1, 12.6.4 and 7.11.4. */
const ACTIVE = ['/JavaScript', '/Launch', '/EmbeddedFile', '/RichMedia'] as const

/** A PDF by its content: its mark at the start and its end mark near the end. */
export function checkCertificate(bytes: Buffer): CheckedFile {
  if (!/^%PDF-[12]\.\d/.test(bytes.subarray(0, 8).toString('latin1'))) throw otherKind('This is not a PDF.')
  if (!bytes.subarray(-1024).includes('%%EOF')) throw fileFault('The PDF is cut off: it has no end.')
  const active = ACTIVE.find((name) => bytes.includes(name))
  if (active) throw fileFault(`The PDF carries ${active.slice(1)}: save it as a plain PDF.`)
  return { content: bytes, mediaType: 'application/pdf' }
}

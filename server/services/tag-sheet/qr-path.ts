import { create } from 'qrcode'
import type { QrLabel } from '#shared/engine/qr-label.ts'

/**
 * A code as PDF path operators, one unit a module, quiet zone not included: each row's dark stretches as rectangles,
 * to be painted by one fill. Stretches of a row instead of single modules make the path a fifth as long.
 */
export function qrPath(text: string, { version, level, mode }: QrLabel): string {
  const segments = [mode === 'byte' ? { data: Buffer.from(text), mode } : { data: text, mode }]
  const { modules } = create(segments, { version, errorCorrectionLevel: level })
  const parts: string[] = []
  for (let row = 0; row < modules.size; row += 1) {
    for (let from = 0; from < modules.size; from += 1) {
      if (!modules.get(row, from)) continue
      let to = from + 1
      while (to < modules.size && modules.get(row, to)) to += 1
      parts.push(`${from} ${row} ${to - from} 1 re`)
      from = to
    }
  }
  return parts.join('\n')
}

import { dayText } from '#shared/engine/readiness/sentences.ts'
import type { HorizonStep } from '#shared/contracts/board.ts'
import type { Verdict } from '#shared/engine/vocabulary.ts'
import { localDay, type GroupTx, type Statement } from '../../group-transaction.ts'

const ROWS: Statement = {
  name: 'board-outlooks',
  text: 'SELECT kit_id, designation, horizon FROM board_row WHERE group_id = $1',
}

const VERDICT_WORDS: Record<Verdict, string> = {
  proven: 'proven',
  'proven-with-limits': 'proven with limits',
  'not-proven': 'not proven',
  'not-fit': 'not fit',
}

export interface Outlook {
  readonly designation: string
  /** "Proven now; not proven from 25 Nov 2026." */
  readonly text: string
}

/** What becomes of every kit if nobody does anything, from the kept board. */
export async function outlooks(tx: GroupTx): Promise<Map<string, Outlook>> {
  const zone = await tx.zone()
  const rows = await tx.sql<{ kit_id: string; designation: string; horizon: string }>(ROWS, [tx.groupId])
  return new Map(
    rows.map(({ kit_id: kitId, designation, horizon }) => {
      const text = outlookText(JSON.parse(horizon) as HorizonStep[], zone)
      return [kitId, { designation, text }]
    }),
  )
}

export function outlookText(steps: readonly HorizonStep[], zone: string): string {
  const [now, next] = steps
  if (!now) return ''
  const current = VERDICT_WORDS[now.verdict]
  const today = `${current.charAt(0).toUpperCase()}${current.slice(1)} now`
  if (!next || now.until === null) return `${today}.`
  return `${today}; ${VERDICT_WORDS[next.verdict]} from ${dayText(localDay(new Date(now.until), zone))}.`
}

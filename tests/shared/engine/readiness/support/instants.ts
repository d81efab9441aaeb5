import type { EpochMs } from '#shared/engine/readiness/types.ts'

/** Seven hours behind UTC all year. */
export const ZONE = 'Etc/GMT+7'
const OFFSET = '-07:00'

/** An instant on the wall clock of `ZONE`: '2026-10-31 18:00', or the midnight that begins '2026-10-31'. */
export function at(local: string): EpochMs {
  const [day = '', time = '00:00'] = local.split(' ')
  return Date.parse(`${day}T${time}:00${OFFSET}`)
}

/** The moment at which the scenario's verdicts hold. */
export const D0 = at('2026-10-31 18:00')

import type { HeatProjection } from '#shared/engine/heat-projection.ts'
import { whyTooShort } from '#shared/engine/heat-too-short.ts'
import { quantityText } from '@/format/quantity.ts'

export interface Outlook {
  readonly headline: string
  readonly lines: readonly string[]
  readonly why: string
}

type UnitText = (value: number, unit: string, digits?: number) => string

/** What may be said while the key is down: no end temperature unless the readings carry one. Times count from the last reading. */
export function outlookText(projection: HeatProjection, limitC: number, text: UnitText): Outlook {
  const limit = text(limitC, '°C', 0)
  switch (projection.state) {
    case 'waiting':
      return said('Two readings are needed before anything can be said.')
    case 'no-rise':
      return said('It has not warmed so far.')
    case 'at-limit':
      return said(`A reading is at the limit of ${limit}: release the key.`)
    case 'slope':
      return slope(projection, limit, text)
    case 'curve':
      return curve(projection, limit, text)
  }
}

const said = (headline: string): Outlook => ({ headline, lines: [], why: '' })

function slope(
  { fit, soonestS }: Extract<HeatProjection, { state: 'slope' }>,
  limit: string,
  text: UnitText,
): Outlook {
  const rate = `${text(fit.slopeKPerS * 60, 'K', 1)} a minute`
  return {
    headline: 'This log is too short to say where the temperature ends.',
    lines: [`It warms by ${rate}: ${limit} is met in ${span(soonestS)} at the earliest, if at all.`],
    why: `Of this log: ${whyTooShort(fit.because)}.`,
  }
}

function curve(
  projection: Extract<HeatProjection, { state: 'curve' }>,
  limit: string,
  text: UnitText,
): Outlook {
  const { endC, endLowC, endHighC, fit } = projection
  const range = `${text(endLowC, '°C', 0)} to ${text(endHighC, '°C', 0)}`
  return {
    headline: `Heading for ${text(endC, '°C', 0)} if keyed on at this power.`,
    lines: [`95 % of what these readings allow lies in ${range}.`, timeText(projection, limit)],
    why: fit.warnings.map(({ message }) => message).join(' '),
  }
}

function timeText(
  { toLimitS, soonestS, latestS }: Extract<HeatProjection, { state: 'curve' }>,
  limit: string,
): string {
  if (toLimitS === null)
    return soonestS === null
      ? `These readings do not lead to ${limit} at this power.`
      : `It need not reach ${limit}; if it does, in ${span(soonestS)} at the earliest.`
  const latest = latestS === null ? 'or never' : `${span(latestS)} at the latest`
  return `It meets ${limit} in about ${span(toLimitS)}, ${span(soonestS ?? 0)} at the earliest, ${latest}.`
}

/** Rounded down: nobody should key longer for a rounded figure. */
function span(seconds: number): string {
  if (seconds < 60) return quantityText(Math.max(0, Math.floor(seconds)), 's', 0)
  const minutes = seconds / 60
  return quantityText(minutes < 10 ? Math.floor(minutes * 2) / 2 : Math.floor(minutes), 'min', 1)
}

import { BANDS, MODES, type Band, type Mode } from '#shared/engine/vocabulary.ts'
import type { QueryInputOf } from '#shared/contracts/endpoint.ts'
import type { answerNeed } from '#shared/contracts/board-need.ts'

/** What the coordinator needs. Figures are as in the address, so that nothing typed is lost. */
export interface AskedNeed {
  readonly bands: readonly Band[]
  readonly mode: Mode | null
  readonly watts: number | null
  readonly hours: number | null
  readonly mains: boolean
  readonly at: string | null
}

export const LIMITS = { watts: { min: 0.1, max: 5000 }, hours: { min: 0.1, max: 1000 } } as const

/** In the address one short text that can be read: `40m,voice,60W,12h,mains,at:<place>`. Other parts are left out. */
export function readNeed(text: string): AskedNeed {
  const parts = text.split(',')
  return {
    bands: BANDS.filter((band) => parts.includes(bandPart(band))),
    mode: MODES.find((mode) => parts.includes(mode)) ?? null,
    watts: amountOf(parts, /^(\d+(?:\.\d+)?)W$/, LIMITS.watts),
    hours: amountOf(parts, /^(\d+(?:\.\d+)?)h$/, LIMITS.hours),
    mains: parts.includes('mains'),
    at: parts.find((part) => PLACE.test(part))?.slice('at:'.length) ?? null,
  }
}

export function writeNeed({ bands, mode, watts, hours, mains, at }: AskedNeed): string {
  const parts = [
    ...bands.map(bandPart),
    mode,
    watts === null ? null : `${watts}W`,
    hours === null ? null : `${hours}h`,
    mains ? 'mains' : null,
    at === null ? null : `at:${at}`,
  ]
  return parts.filter((part) => part !== null).join(',')
}

/** Whether anything is asked for; mains alone asks for nothing. */
export function isAsked({ bands, mode, watts, hours, at }: AskedNeed): boolean {
  return bands.length > 0 || [mode, watts, hours, at].some((part) => part !== null)
}

export function needQuery(need: AskedNeed, asOf: string | null): QueryInputOf<typeof answerNeed> {
  const { bands, mode, watts, hours, mains, at } = need
  const query = {
    ...(asOf && { asOf }),
    ...(bands.length > 0 && { bands: bands.join(',') }),
    ...(mode && { mode }),
    ...(watts !== null && { watts }),
    ...(hours !== null && { hours }),
    ...(mains && { mains: 'true' }),
    ...(at && { at }),
  }
  return query as QueryInputOf<typeof answerNeed>
}

/** What is needed as one line, for paper and for those who listen. */
export function needText({ bands, mode, watts, hours, mains }: AskedNeed, place: string | undefined): string {
  const lasting = hours === null ? '' : `${hours} h ${mains ? 'with mains or a vehicle' : 'on own batteries'}`
  return [
    bands.join(' and '),
    mode ?? '',
    watts === null ? '' : `${watts} W at the antenna`,
    lasting,
    place ? `at ${place}` : '',
  ]
    .filter((part) => part !== '')
    .join(', ')
}

const bandPart = (band: Band) => band.replace(' ', '')
const PLACE = /^at:[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i

function amountOf(parts: readonly string[], shape: RegExp, { min, max }: { min: number; max: number }) {
  const value = Number(parts.map((part) => shape.exec(part)?.[1]).find((found) => found !== undefined))
  return value >= min && value <= max ? value : null
}

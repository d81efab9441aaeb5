import type { Band, Category, Mode } from '#shared/engine/vocabulary.ts'
import { MODE_WORDS } from '@/registry-words.ts'
import { CATEGORY_WORDS } from '@/words.ts'

interface DescribedKind {
  readonly code: string
  readonly name: string
  readonly station: boolean
  readonly promise: {
    readonly bands: readonly Band[]
    readonly modes: readonly Mode[]
    readonly watts: number | string | null
    readonly hours: number | string | null
    readonly transmitPercent?: number | string | null | undefined
  }
  readonly positions: readonly DescribedPosition[]
}

interface DescribedPosition {
  readonly name: string
  readonly category: Category | null
  readonly quantity: number | string | null
  readonly vital: boolean
  readonly requires: Requirements
}

export interface Requirements {
  readonly connector?: string
  readonly minA?: number | string | null
  readonly minWatts?: number | string | null
  readonly minAh?: number | string | null
  readonly note?: string
}

/** A kind field by field, as two versions are laid side by side; the load plan one line a position. */
export function describeKitKind(kind: DescribedKind): Record<string, string> {
  return {
    Code: kind.code,
    Name: kind.name,
    'Counts as': kind.station ? 'Station' : 'Support',
    Bands: kind.promise.bands.join(', '),
    Modes: kind.promise.modes.map((mode) => MODE_WORDS[mode]).join(', '),
    'Watts at the radio': String(kind.promise.watts ?? ''),
    Hours: String(kind.promise.hours ?? ''),
    'Transmitting, % of the time': String(kind.promise.transmitPercent ?? ''),
    'Load plan': kind.positions.map(positionLine).join('\n'),
  }
}

function positionLine(position: DescribedPosition, place: number): string {
  const { name, category, quantity, vital, requires } = position
  const of = category ? CATEGORY_WORDS[category].toLowerCase() : 'no category'
  const asked = requirementsText(requires)
  return `${place + 1}. ${name || 'unnamed'} (${of} × ${quantity ?? '?'}, ${vital ? 'vital' : 'supporting'}${asked && `, ${asked}`})`
}

/** `N plug, 25 A or more`; empty where nothing is asked. */
export function requirementsText({ connector, minA, minWatts, minAh, note }: Requirements): string {
  return [
    connector,
    minA != null && minA !== '' && `${minA} A or more`,
    minWatts != null && minWatts !== '' && `${minWatts} W or more`,
    minAh != null && minAh !== '' && `${minAh} Ah or more`,
    note,
  ]
    .filter(Boolean)
    .join(', ')
}

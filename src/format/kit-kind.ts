import type { Band, Mode } from '#shared/engine/vocabulary.ts'
import { BANDS } from '#shared/engine/vocabulary.ts'
import { MODE_WORDS } from '@/registry-words.ts'
import { quantityText } from './quantity.ts'

interface KindNamed {
  readonly id: string
  readonly code: string
  readonly name: string
}

/** Kinds as options of a filter or a form, by the short code that the group says and the name. */
export function kitKindOptions(kinds: readonly KindNamed[] | undefined) {
  return (kinds ?? []).map(({ id, code, name }) => ({ value: id, label: `${code} ${name}` }))
}

interface KindPromise {
  readonly bands: readonly Band[]
  readonly modes: readonly Mode[]
  readonly watts: number | null
  readonly hours: number | null
  readonly transmitPercent?: number | null | undefined
}

/** `40 m, 20 m · voice · 100 W · 12 h`; empty where a kind promises nothing. */
export function promiseText({ bands, modes, watts, hours, transmitPercent }: KindPromise): string {
  const parts = [
    BANDS.filter((band) => bands.includes(band)).join(', '),
    modes.map((mode) => MODE_WORDS[mode].toLowerCase()).join(' and '),
    watts === null ? '' : quantityText(watts, 'W', 1),
    hours === null ? '' : quantityText(hours, 'h', 1),
    transmitPercent ? `${quantityText(transmitPercent, '%', 0)} of the time transmitting` : '',
  ]
  return parts.filter((part) => part !== '').join(' · ')
}

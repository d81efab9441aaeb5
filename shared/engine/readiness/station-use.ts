import type { Band } from '../vocabulary.ts'
import type { KitPromise } from './types.ts'

/** How a station of a kind is used: how much of the time its radio draws the current of full power. */
export interface StationUse {
  /** Share of the time in which somebody transmits, 0 to 1. */
  readonly transmitShare: number
  /** False: the kind says nothing and the default stands. */
  readonly stated: boolean
  readonly emission: 'digital' | 'relay' | 'voice, FM' | 'voice, sideband'
  /** Share of a transmission in which the current of full power flows, 0 to 1. */
  readonly currentFactor: number
}

/** Common practice, no source: casual operation is near a tenth, a busy net control near a half. */
export const DEFAULT_TRANSMIT_SHARE = 0.2

/**
 * Sideband with heavy processing carries half of its peak power (FCC OET Bulletin 65 Supplement B, Table 2); that the
 * current follows it is our choice, on the short side: a conversation without processing draws less.
 */
const SIDEBAND_FACTOR = 0.5
const FM_BANDS: readonly Band[] = ['2 m', '1.25 m', '70 cm']

/** The heaviest of what a kind promises decides: whoever takes the kit may use that mode all the time. */
export function stationUse({ bands, modes, transmitPercent }: KitPromise): StationUse {
  const base = {
    transmitShare: transmitPercent ? transmitPercent / 100 : DEFAULT_TRANSMIT_SHARE,
    stated: !!transmitPercent,
    currentFactor: 1,
  }
  if (modes.includes('digital')) return { ...base, emission: 'digital' }
  if (modes.includes('relay')) return { ...base, emission: 'relay' }
  if (bands.some((band) => FM_BANDS.includes(band))) return { ...base, emission: 'voice, FM' }
  return { ...base, emission: 'voice, sideband', currentFactor: SIDEBAND_FACTOR }
}

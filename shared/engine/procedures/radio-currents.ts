/** The supply currents that a radio check read, as endurance uses them: measured, dated, and of what. */

/** Where the ammeter stood: in the radio's own lead, or in the battery's with everything of the station running. */
export type CurrentOf = 'radio' | 'station'

export interface RadioCurrents {
  readonly of: CurrentOf
  /** While receiving, A; null: not read. */
  readonly receiveA: number | null
  /** Key-down, A, at each power setting that was tried with an ammeter. */
  readonly transmit: readonly { readonly settingW: number; readonly currentA: number }[]
}

export interface CurrentInputs {
  readonly readings: readonly { readonly settingW: number; readonly currentA?: number | undefined }[]
  readonly receiveA?: number | undefined
  readonly currentOf?: CurrentOf | undefined
}

/** Of a test's stored inputs; null where no current was read while transmitting: a check of the power alone. */
export function currentsOf({ readings, receiveA, currentOf = 'radio' }: CurrentInputs): RadioCurrents | null {
  const transmit = readings.flatMap(({ settingW, currentA }) =>
    currentA === undefined || currentA === 0 ? [] : [{ settingW, currentA }],
  )
  return transmit.length === 0 ? null : { of: currentOf, receiveA: receiveA ?? null, transmit }
}

/**
 * Key-down current at the lowest setting that gives the power asked for, A, the largest of all bands; the highest
 * setting's where none does, or where no power is asked for. Half the power is not half the current: nothing is
 * interpolated. Null of none.
 */
export function currentAtPower(
  draws: readonly { readonly settingW: number; readonly currentA: number }[],
  watts: number | null,
): { readonly settingW: number; readonly currentA: number } | null {
  const enough = draws.filter(({ settingW }) => watts !== null && settingW >= watts)
  const settings = (enough.length > 0 ? enough : draws).map(({ settingW }) => settingW)
  if (settings.length === 0) return null
  const settingW = enough.length > 0 ? Math.min(...settings) : Math.max(...settings)
  const currents = draws.filter((draw) => draw.settingW === settingW).map(({ currentA }) => currentA)
  return { settingW, currentA: Math.max(...currents) }
}

import type { NeedKit, Shortfall } from '#shared/engine/readiness/need.ts'
import type { Reason } from '#shared/engine/readiness/period-types.ts'
import type { Procedure } from '#shared/engine/vocabulary.ts'

interface Shown {
  readonly capability: NeedKit['capability']
  /** Weightiest first. */
  readonly reasons: readonly Reason[]
}

/** What shows the hours and the modes of a kit. */
const PROCEDURE_OF: Partial<Record<Shortfall['kind'], Procedure>> = {
  hours: 'battery-capacity',
  mode: 'boot-and-update',
}

/** The test that shows a shortfall: of the reason that says so, else the oldest that the band stands on. */
export function evidenceOf(shortfall: Shortfall, { capability, reasons }: Shown): string | null {
  const tested = reasons.filter(({ testId }) => testId !== null)
  if (shortfall.kind === 'verdict') return reasons[0]?.testId ?? null
  const procedure = PROCEDURE_OF[shortfall.kind]
  if (procedure) return tested.find((reason) => reason.procedure === procedure)?.testId ?? null
  if (shortfall.kind !== 'watts' && shortfall.kind !== 'band') return null
  const { band } = shortfall
  const about = tested.find((reason) => reason.band !== null && reason.band === band)
  return about?.testId ?? capability.bands.find((one) => one.band === band)?.testId ?? null
}

import type { Band } from '../vocabulary.ts'
import { bestPart, CLEAR, covers, type BandPart } from './band-part.ts'
import { reasonForStanding } from './check-reason.ts'
import type { Moment } from './moment.ts'
import { reasonOf } from './reason.ts'
import { ruleFor } from './rules-in-force.ts'
import { replaceAction } from './sentences.ts'
import { standingOf } from './standing.ts'
import type { ReadinessItem } from './types.ts'

const SWEEP = ['antenna-sweep'] as const

/** The best of the kit's antennas on a band. A failed sweep takes the band out; a missing one leaves it not proven. */
export function antennaPart(moment: Moment, antennas: readonly ReadinessItem[], band: Band): BandPart {
  if (antennas.length === 0) return CLEAR
  const fitting = antennas.filter(({ facts }) => covers(facts.bands, band))
  const best = bestPart(fitting.map((antenna) => oneAntenna(moment, antenna, band)))
  return best ?? noneCovers(antennas, band)
}

function oneAntenna(moment: Moment, antenna: ReadinessItem, band: Band): BandPart {
  const rule = ruleFor(moment.policy, antenna, 'antenna-sweep', moment.today)
  if (!rule) return CLEAR
  const standing = standingOf(moment, { subjectId: antenna.id, procedures: SWEEP, rule, band })
  const tests = standing.test ? [standing.test] : []
  if (standing.state === 'good') return { ...CLEAR, tests }
  if (standing.state === 'failed') {
    const text = `${band} out: ${antenna.designation}, ${standing.finding!.text}`
    const about = { band, itemId: antenna.id, positionId: antenna.positionId, testId: standing.test!.id }
    const action = {
      kind: 'repair',
      text: `Put ${antenna.designation} right, then sweep it`,
      minutes: 60,
    } as const
    const reason = reasonOf({
      code: 'antenna-failed',
      level: 'limit',
      text,
      ...about,
      procedure: 'antenna-sweep',
      action,
    })
    return { ...CLEAR, state: 'out', tests, reasons: [reason] }
  }
  const subject = { name: antenna.designation, itemId: antenna.id, positionId: antenna.positionId }
  const reason = reasonForStanding(subject, { procedure: 'antenna-sweep', band, level: 'limit' }, standing)
  return { ...CLEAR, state: rule.vital ? 'not-proven' : 'limited', tests, reasons: reason ? [reason] : [] }
}

function noneCovers(antennas: readonly ReadinessItem[], band: Band): BandPart {
  const [antenna] = antennas
  const text = `${band} out: no antenna in the kit covers it`
  const action = replaceAction(antenna!.designation)
  const reason = reasonOf({
    code: 'antenna-not-covering',
    level: 'limit',
    text,
    band,
    itemId: antenna!.id,
    action,
  })
  return { ...CLEAR, state: 'out', reasons: [reason] }
}

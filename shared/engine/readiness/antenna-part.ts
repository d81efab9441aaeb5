import type { Band } from '../vocabulary.ts'
import { repairAction, replaceAction } from './actions.ts'
import { bestPart, CLEAR, covers, standingPart, type BandPart } from './band-part.ts'
import type { Moment } from './moment.ts'
import { reasonAbout } from './reason.ts'
import { ruleFor } from './rules-in-force.ts'
import { notCoveredText, outText } from './sentences.ts'
import { standingOf } from './standing.ts'
import type { ReadinessItem } from './types.ts'

const SWEEP = ['antenna-sweep'] as const

/** The best of the kit's antennas on a band. A failed sweep takes the band out; a missing one leaves it not proven. */
export function antennaPart(moment: Moment, antennas: readonly ReadinessItem[], band: Band): BandPart {
  const [first] = antennas
  if (!first) return CLEAR
  const fitting = antennas.filter(({ facts }) => covers(facts.bands, band))
  return bestPart(fitting.map((antenna) => oneAntenna(moment, antenna, band))) ?? noneCovers(first, band)
}

function oneAntenna(moment: Moment, antenna: ReadinessItem, band: Band): BandPart {
  const rule = ruleFor(moment.policy, antenna, 'antenna-sweep', moment.today, band)
  const standing = standingOf(moment, { subjectId: antenna.id, procedures: SWEEP, rule, band })
  if (standing.state !== 'failed')
    return standingPart({ item: antenna, rule, procedure: 'antenna-sweep', band }, standing)
  const { test, finding } = standing
  const reason = reasonAbout(antenna, {
    code: 'antenna-failed',
    level: 'not-fit',
    text: outText(band, antenna.designation, finding!.text),
    band,
    testId: test!.id,
    procedure: 'antenna-sweep',
    action: repairAction(antenna.designation, 'antenna-sweep'),
  })
  return { ...CLEAR, state: 'out', tests: [test!], reasons: [reason] }
}

function noneCovers(antenna: ReadinessItem, band: Band): BandPart {
  const reason = reasonAbout(antenna, {
    code: 'antenna-not-covering',
    level: 'not-fit',
    text: notCoveredText(band, antenna.designation),
    band,
    action: replaceAction(antenna.designation),
  })
  return { ...CLEAR, state: 'out', reasons: [reason] }
}

import type { Band } from '../vocabulary.ts'
import { CLEAR, covers, type BandPart } from './band-part.ts'
import type { Moment } from './moment.ts'
import type { RadioPower } from './power-cap.ts'
import { reasonOf } from './reason.ts'
import { ruleFor } from './rules-in-force.ts'
import { amountText, replaceAction } from './sentences.ts'
import { standingOf } from './standing.ts'
import type { ReadinessItem } from './types.ts'

const CHECK = ['radio-check'] as const

/** What the radio puts out on a band: the power allowed, or the measured one where its check failed. */
export function radioPart(
  moment: Moment,
  radio: ReadinessItem | undefined,
  power: RadioPower,
  band: Band,
): BandPart {
  if (!radio) return CLEAR
  if (!covers(radio.facts.bands, band))
    return outPart(radio, band, `${band} out: ${radio.designation} does not cover it`)
  const lowered = power.promisedW !== null && power.allowedW !== null && power.allowedW < power.promisedW
  const base: BandPart = { ...CLEAR, state: lowered ? 'limited' : 'proven', capW: power.allowedW ?? Infinity }
  const rule = ruleFor(moment.policy, radio, 'radio-check', moment.today)
  const standing = standingOf(moment, { subjectId: radio.id, procedures: CHECK, rule, band })
  const { finding, test } = standing
  if (standing.state !== 'failed' || finding?.measure !== 'watts') return base
  const measuredW = finding.value ?? 0
  if (measuredW <= 0)
    return outPart(radio, band, `${band} out: ${radio.designation} gives no power`, test!.id)
  const text = `${band}: ${radio.designation} gives ${amountText(measuredW)} W`
  const reason = reasonFor(radio, band, 'radio-power-low', text, test!.id)
  return { ...base, state: 'limited', capW: Math.min(base.capW, measuredW), reasons: [reason] }
}

function outPart(radio: ReadinessItem, band: Band, text: string, testId: string | null = null): BandPart {
  return { ...CLEAR, state: 'out', reasons: [reasonFor(radio, band, 'radio-out', text, testId)] }
}

function reasonFor(radio: ReadinessItem, band: Band, code: string, text: string, testId: string | null) {
  return reasonOf({
    code,
    level: 'limit',
    text,
    band,
    itemId: radio.id,
    positionId: radio.positionId,
    testId,
    procedure: testId ? 'radio-check' : null,
    action: replaceAction(radio.designation),
  })
}

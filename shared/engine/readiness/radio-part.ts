import type { Band } from '../vocabulary.ts'
import { replaceAction } from './actions.ts'
import { bestPart, CLEAR, covers, joinParts, standingPart, type BandPart } from './band-part.ts'
import type { Moment } from './moment.ts'
import { radioPower } from './power-cap.ts'
import { reasonAbout } from './reason.ts'
import { ruleFor } from './rules-in-force.ts'
import { notCoveredText, outText, radioLowText } from './sentences.ts'
import type { Standing } from './standing.ts'
import type { Reason } from './period-types.ts'
import type { ReadinessItem } from './types.ts'
import { standingOnBand } from './whole-or-band.ts'

interface Station {
  readonly radios: readonly ReadinessItem[]
  /** The weakest lead or box between battery and radio. */
  readonly feed: ReadinessItem | undefined
}

/** The best of the kit's radios on a band: the power allowed, or the measured one where its check failed. */
export function radioPart(moment: Moment, { radios, feed }: Station, band: Band): BandPart {
  return bestPart(radios.map((radio) => oneRadio(moment, radio, feed, band))) ?? CLEAR
}

function oneRadio(
  moment: Moment,
  radio: ReadinessItem,
  feed: ReadinessItem | undefined,
  band: Band,
): BandPart {
  if (!covers(radio.facts.bands, band)) {
    const text = notCoveredText(band, radio.designation)
    return outPart(failure(radio, band, { code: 'radio-not-covering', text }))
  }
  const { allowedW, reasons } = radioPower(moment.state.promise.watts, radio, feed)
  const state = allowedW === 0 ? 'out' : reasons.length > 0 ? 'limited' : 'proven'
  const fed: BandPart = { ...CLEAR, state, capW: allowedW ?? Infinity, reasons }
  return joinParts([fed, checkedPart(moment, radio, band)])
}

function checkedPart(moment: Moment, radio: ReadinessItem, band: Band): BandPart {
  const rule = ruleFor(moment.policy, radio, 'radio-check', moment.today, band)
  const check = { item: radio, procedure: 'radio-check', rule, band, failsEverywhere: false } as const
  const standing = standingOnBand(moment, check)
  if (standing.state !== 'failed')
    return standingPart({ item: radio, rule, procedure: 'radio-check', band: null }, standing)
  return failedCheck(radio, band, standing)
}

/** Less power than asked for is a limit; no power, or a radio that does not receive, takes the band out. */
function failedCheck(radio: ReadinessItem, band: Band, { test, finding }: Standing): BandPart {
  const measuredW = finding!.measure === 'watts' ? (finding!.value ?? 0) : 0
  const shown = { testId: test!.id, procedure: 'radio-check' } as const
  if (measuredW <= 0) {
    const text = outText(band, radio.designation, finding!.text)
    return { ...outPart(failure(radio, band, { code: 'radio-out', text, ...shown })), tests: [test!] }
  }
  const text = radioLowText(radio.designation, band, measuredW)
  const reason = failure(radio, band, { code: 'radio-power-low', level: 'limit', text, ...shown })
  return { ...CLEAR, state: 'limited', capW: measuredW, tests: [test!], reasons: [reason] }
}

function outPart(reason: Reason): BandPart {
  return { ...CLEAR, state: 'out', reasons: [reason] }
}

function failure(radio: ReadinessItem, band: Band, said: Partial<Reason> & Pick<Reason, 'code' | 'text'>) {
  const action = replaceAction(radio.designation)
  return reasonAbout(radio, { level: 'not-fit', band, action, ...said })
}

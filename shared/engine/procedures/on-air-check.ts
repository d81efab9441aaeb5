/**
 * Contacts on the air: the whole chain of a kit at work, band by band. A report is an opinion, so it is kept and not
 * judged. Source: common practice, no source.
 */
import type { Outcome } from '../outcome.ts'
import type { TestFinding } from '../readiness/types.ts'
import type { Band } from '../vocabulary.ts'
import { figure, findingOf, judgementOf, type Judgement } from './judgement.ts'

export interface OnAirContact {
  readonly band: Band
  readonly powerW: number
  readonly answered: boolean
  readonly answeredBy: string
  readonly reportReceived: string
  readonly reportSent: string
}

export interface OnAirCheckInputs {
  readonly contacts: readonly OnAirContact[]
}

export function judgeOnAirCheck({ contacts }: OnAirCheckInputs): Outcome<Judgement> {
  const answered = contacts.filter((contact) => contact.answered).map(({ band }) => band)
  return judgementOf({ answered, tried: contacts.length }, contacts.map(contactFinding))
}

function contactFinding(contact: OnAirContact): TestFinding {
  const { band, powerW, answered } = contact
  return findingOf({
    band,
    powerW,
    measure: 'answered',
    value: answered ? 1 : 0,
    finding: answered ? 'pass' : 'fail',
    limit: 'one contact answered',
    text: answered ? answeredText(contact) : `nobody answered at ${figure(powerW, 1)} W`,
  })
}

function answeredText({ powerW, answeredBy, reportReceived }: OnAirContact): string {
  const by = answeredBy === '' ? 'answered' : `answered by ${answeredBy}`
  const report = reportReceived === '' ? '' : `, report ${reportReceived}`
  return `${by} at ${figure(powerW, 1)} W${report}`
}

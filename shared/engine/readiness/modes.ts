import { addMonths } from '../plain-date.ts'
import type { Mode } from '../vocabulary.ts'
import type { Moment } from './moment.ts'
import { reasonOf } from './reason.ts'
import { ruleFor } from './rules-in-force.ts'
import { dayText, neverText, testAction } from './sentences.ts'
import { itemsOf, type FilledPosition } from './slots.ts'
import { candidates, dueOf, type Candidate } from './standing.ts'
import type { ReadinessItem, Reason, Rule } from './types.ts'

export interface JudgedModes {
  readonly modes: readonly Mode[]
  readonly reasons: readonly Reason[]
}

const BOOT = ['boot-and-update'] as const

/** Emission modes left: a computer that was not booted and updated lately limits the kit to voice. */
export function judgeModes(moment: Moment, filled: readonly FilledPosition[]): JudgedModes {
  const promised = moment.state.promise.modes
  const judged = itemsOf(filled, 'computer').map((computer) => judgeComputer(moment, computer))
  const lost = judged.some(({ digital }) => !digital) && promised.includes('digital')
  const modes = lost ? promised.filter((mode) => mode !== 'digital') : promised
  const level = lost && modes.length === 0 ? 'not-proven' : 'limit'
  return { modes, reasons: judged.flatMap(({ reason }) => (reason ? [{ ...reason, level }] : [])) }
}

interface JudgedComputer {
  readonly digital: boolean
  readonly reason: Reason | undefined
}

function judgeComputer(moment: Moment, computer: ReadinessItem): JudgedComputer {
  const rule = ruleFor(moment.policy, computer, 'boot-and-update', moment.today)
  if (!rule) return { digital: true, reason: undefined }
  const [newest] = candidates(moment, { subjectId: computer.id, procedures: BOOT, band: null })
  if (!newest) return lost(computer, neverText(computer.designation, 'boot-and-update', null), null)
  const last = dayText(newest.test.performedOn)
  if (newest.finding.finding === 'fail') {
    return lost(computer, `Voice only: ${computer.designation} ${newest.finding.text}`, newest)
  }
  if (isVoiceOnly(moment, rule, newest)) {
    return lost(computer, `Voice only: ${computer.designation} last booted and updated on ${last}`, newest)
  }
  const dueOn = dueOf(newest.test, rule)
  if (dueOn === null || moment.passedAt(dueOn) > moment.at) return { digital: true, reason: undefined }
  const text = `${computer.designation} was last booted and updated on ${last}`
  return { digital: true, reason: bootReason(computer, text, newest) }
}

function isVoiceOnly(moment: Moment, rule: Rule, newest: Candidate): boolean {
  const months = voiceOnlyMonths(rule)
  return months !== null && moment.passedAt(addMonths(newest.test.performedOn, months)) <= moment.at
}

/** After how many months without a boot the kit is limited to voice; null: never by this rule. */
export function voiceOnlyMonths(rule: Rule): number | null {
  const months = rule.limits.voiceOnlyAfterMonths
  return typeof months === 'number' ? months : null
}

function lost(computer: ReadinessItem, text: string, by: Candidate | null): JudgedComputer {
  return { digital: false, reason: bootReason(computer, text, by) }
}

function bootReason(computer: ReadinessItem, text: string, by: Candidate | null): Reason {
  return reasonOf({
    code: 'boot-and-update',
    level: 'limit',
    text,
    itemId: computer.id,
    positionId: computer.positionId,
    testId: by?.test.id ?? null,
    procedure: 'boot-and-update',
    action: testAction(computer.designation, 'boot-and-update', null),
  })
}

import { addMonths } from '../plain-date.ts'
import type { Mode } from '../vocabulary.ts'
import { fillAction, testAction } from './actions.ts'
import type { Moment } from './moment.ts'
import { reasonAbout, reasonOf } from './reason.ts'
import { ruleFor } from './rules-in-force.ts'
import { bootedText, NEVER_BOOTED, NO_MODE_LEFT, voiceOnlyText } from './sentences.ts'
import { itemsOf, type FilledPosition } from './slots.ts'
import { candidates, dueOf, hasPassed, type Candidate } from './standing.ts'
import type { Reason } from './period-types.ts'
import type { ReadinessItem, Rule } from './types.ts'

export interface JudgedModes {
  readonly modes: readonly Mode[]
  readonly reasons: readonly Reason[]
}

const BOOT = ['boot-and-update'] as const

/** Emission modes left: without a computer that was booted and updated lately the kit is limited to voice. */
export function judgeModes(moment: Moment, filled: readonly FilledPosition[]): JudgedModes {
  const promised = moment.state.promise.modes
  const plansComputer = filled.some(({ position }) => position.category === 'computer')
  const judged = itemsOf(filled, 'computer').map((computer) => judgeComputer(moment, computer))
  const lost = plansComputer && promised.includes('digital') && !judged.some(({ digital }) => digital)
  const modes = lost ? promised.filter((mode) => mode !== 'digital') : promised
  const reasons = judged.flatMap((one) => (one.why === '' ? [] : [bootReason(one, lost)]))
  return { modes, reasons: modes.length === 0 && lost ? [...reasons, noModeLeft()] : reasons }
}

interface JudgedComputer {
  readonly computer: ReadinessItem
  readonly digital: boolean
  /** What is wrong, without the computer's name; empty when nothing is. */
  readonly why: string
  readonly by: Candidate | null
}

function judgeComputer(moment: Moment, computer: ReadinessItem): JudgedComputer {
  const rule = ruleFor(moment.policy, computer, 'boot-and-update', moment.today)
  if (!rule) return { computer, digital: true, why: '', by: null }
  const [by] = candidates(moment, { subjectId: computer.id, procedures: BOOT, band: null })
  if (!by) return { computer, digital: false, why: NEVER_BOOTED, by: null }
  if (by.finding.finding === 'fail') return { computer, digital: false, why: by.finding.text, by }
  const why = bootedText(by.test.performedOn)
  if (isVoiceOnly(moment, rule, by)) return { computer, digital: false, why, by }
  return { computer, digital: true, why: hasPassed(moment, dueOf(by.test, rule)) ? why : '', by }
}

function isVoiceOnly(moment: Moment, rule: Rule, { test }: Candidate): boolean {
  const months = voiceOnlyMonths(rule)
  return months !== null && hasPassed(moment, addMonths(test.performedOn, months))
}

/** After how many months without a boot the kit is limited to voice; null: never by this rule. */
export function voiceOnlyMonths(rule: Rule): number | null {
  const months = rule.limits.voiceOnlyAfterMonths
  return typeof months === 'number' ? months : null
}

function bootReason({ computer, digital, why, by }: JudgedComputer, lost: boolean): Reason {
  const { designation } = computer
  return reasonAbout(computer, {
    code: 'boot-and-update',
    level: 'limit',
    text: lost && !digital ? voiceOnlyText(designation, why) : `${designation} ${why}`,
    testId: by?.test.id ?? null,
    procedure: 'boot-and-update',
    action: testAction(designation, 'boot-and-update', null),
  })
}

function noModeLeft(): Reason {
  const action = fillAction('computer')
  return reasonOf({ code: 'no-mode-left', level: 'not-proven', text: NO_MODE_LEFT, action })
}

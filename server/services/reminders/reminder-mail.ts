import { dayText, PROCEDURE_WORDS, capital } from '#shared/engine/readiness/sentences.ts'
import type { DueCheck } from '#shared/contracts/due-checks.ts'

/** A kit with its checks, and what becomes of it if nobody does anything. */
export interface ReminderKit {
  readonly kitId: string | null
  /** "K-16", or what the loose items are called. */
  readonly heading: string
  /** "Proven now; not proven from 25 Nov 2026.", empty for loose items. */
  readonly outlook: string
  readonly checks: readonly DueCheck[]
}

export interface ReminderContent {
  readonly memberName: string
  readonly groupName: string
  /** The quartermaster's digest of the whole group, or the kits a member answers for. */
  readonly scope: 'group' | 'own'
  readonly overdue: readonly ReminderKit[]
  readonly coming: readonly ReminderKit[]
  readonly publicUrl: string
  readonly changeLink: string
}

export interface MailText {
  readonly subject: string
  readonly text: string
  readonly html: string
}

/** One message: what is overdue, what falls due soon, what it does to which kit, and how to get fewer of these. */
export function reminderMail(content: ReminderContent): MailText {
  const sections = [
    { title: 'Overdue', kits: content.overdue },
    { title: 'Due soon', kits: content.coming },
  ].filter(({ kits }) => kits.length > 0)
  const opening =
    content.scope === 'group'
      ? `This morning in ${content.groupName}:`
      : `For the kits that you answer for in ${content.groupName}:`
  return {
    subject: subjectOf(content),
    text: textPart(content, opening, sections),
    html: htmlPart(content, opening, sections),
  }
}

interface Section {
  readonly title: string
  readonly kits: readonly ReminderKit[]
}

function subjectOf({ overdue, coming, groupName }: ReminderContent): string {
  const parts = [
    [count(overdue), 'overdue'],
    [count(coming), 'due soon'],
  ].flatMap(([n, word]) => (n === 0 ? [] : [`${n} ${word}`]))
  return `${parts.join(', ')}: ${groupName}`.replace(/\p{Cc}+/gu, ' ')
}

function count(kits: readonly ReminderKit[]): number {
  return kits.reduce((sum, { checks }) => sum + checks.length, 0)
}

function checkText(check: DueCheck): string {
  const band = check.band ? ` on ${check.band}` : ''
  const what = `${check.subject.designation}: ${PROCEDURE_WORDS[check.procedure]}${band}`
  if (check.dueOn === null) return `${what}, ${check.because}`
  return `${what}, ${check.state === 'overdue' ? 'was due' : 'due'} ${dayText(check.dueOn)}`
}

function linkOf(publicUrl: string, check: DueCheck): string {
  return `${publicUrl}/${check.subject.type === 'kit' ? 'kits' : 'items'}/${check.subject.id}`
}

function textPart(content: ReminderContent, opening: string, sections: readonly Section[]): string {
  const lines = [`Hello ${content.memberName},`, '', opening]
  for (const { title, kits } of sections) {
    lines.push('', title.toUpperCase())
    for (const kit of kits) {
      lines.push('', [kit.heading, kit.outlook].filter(Boolean).join(': '))
      for (const check of kit.checks)
        lines.push(`  - ${checkText(check)}`, `    ${linkOf(content.publicUrl, check)}`)
    }
  }
  lines.push('', `The board: ${content.publicUrl}/`, `Change what you get: ${content.changeLink}`, '')
  return lines.join('\n')
}

function htmlPart(content: ReminderContent, opening: string, sections: readonly Section[]): string {
  const body = sections.map(
    ({ title, kits }) => `<h2>${title}</h2>${kits.map((kit) => htmlKit(content, kit)).join('')}`,
  )
  return (
    `<!doctype html><html lang="en"><meta charset="utf-8"><title>${escapeHtml(subjectOf(content))}</title>` +
    `<body style="font:16px/1.5 Inter,system-ui,sans-serif;color:#1d1b17;max-width:38em">` +
    `<p>Hello ${escapeHtml(content.memberName)},</p><p>${escapeHtml(opening)}</p>${body.join('')}` +
    `<p><a href="${content.publicUrl}/">Open the board</a></p>` +
    `<p><a href="${escapeHtml(content.changeLink)}">Change what you get</a></p></body></html>`
  )
}

function htmlKit({ publicUrl }: ReminderContent, kit: ReminderKit): string {
  const heading = kit.kitId
    ? `<a href="${publicUrl}/kits/${kit.kitId}">${escapeHtml(kit.heading)}</a>`
    : escapeHtml(kit.heading)
  const checks = kit.checks.map(
    (check) => `<li><a href="${linkOf(publicUrl, check)}">${escapeHtml(capital(checkText(check)))}</a></li>`,
  )
  const outlook = kit.outlook ? `<br>${escapeHtml(kit.outlook)}` : ''
  return `<p><b>${heading}</b>${outlook}</p><ul>${checks.join('')}</ul>`
}

function escapeHtml(text: string): string {
  return text.replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`)
}

/** The mails about signing in: what a person must know, one link, and what to do when it was not they who asked. */

interface MailText {
  readonly subject: string
  readonly text: string
  readonly html: string
}

interface LinkMail {
  readonly memberName: string
  readonly groupName: string
  readonly link: string
}

export function invitationMail({ memberName, groupName, link }: LinkMail): MailText {
  return compose({
    subject: `Your place in ${groupName}`,
    greeting: `Hello ${memberName},`,
    before: [
      `${groupName} keeps its radio kits in Halyard: which can go, on which bands, for how long. You were added as a member.`,
      'Choose a password to begin:',
    ],
    link,
    after: ['The link works once, for 24 hours. If you do not know this group, leave it unused.'],
  })
}

export function passwordResetMail({ memberName, groupName, link }: LinkMail): MailText {
  return compose({
    subject: 'A new password for Halyard',
    greeting: `Hello ${memberName},`,
    before: [`Somebody asked for a new password for your sign-in with ${groupName}. Choose one here:`],
    link,
    after: [
      'The link works once, for 30 minutes. When you use it you are signed out everywhere else.',
      'If you did not ask, do nothing: your password stays as it is.',
    ],
  })
}

export function passwordChangedMail({ memberName, groupName }: Omit<LinkMail, 'link'>): MailText {
  return compose({
    subject: 'Your password for Halyard was changed',
    greeting: `Hello ${memberName},`,
    before: [`The password of your sign-in with ${groupName} was changed just now.`],
    after: [
      'If that was not you, ask for a new password on the sign-in page at once and tell your administrator.',
    ],
  })
}

interface Parts {
  readonly subject: string
  readonly greeting: string
  readonly before: readonly string[]
  readonly link?: string
  readonly after: readonly string[]
}

function compose({ subject, greeting, before, link, after }: Parts): MailText {
  const lines = [greeting, ...before, ...(link ? [link] : []), ...after]
  const anchor = link ? [`<p><a href="${escapeHtml(link)}">${escapeHtml(link)}</a></p>`] : []
  const html = [...[greeting, ...before].map(paragraph), ...anchor, ...after.map(paragraph)]
  return {
    subject: oneLine(subject),
    text: `${lines.join('\n\n')}\n`,
    html: `<!doctype html><html lang="en"><meta charset="utf-8"><title>${escapeHtml(subject)}</title><body>${html.join('')}</body></html>`,
  }
}

const paragraph = (text: string) => `<p>${escapeHtml(text)}</p>`

const oneLine = (text: string) => text.replace(/\p{Cc}+/gu, ' ')

function escapeHtml(text: string): string {
  return text.replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`)
}

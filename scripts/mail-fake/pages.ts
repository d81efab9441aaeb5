import type { Mail } from './mail.ts'

const STYLE = `
  :root { color-scheme: light dark; font: 16px/1.5 system-ui, sans-serif; }
  body { max-width: 60rem; margin: 2rem auto; padding: 0 1rem; }
  table { border-collapse: collapse; width: 100%; }
  th, td { text-align: left; padding: .5rem .75rem .5rem 0; border-bottom: 1px solid #8886; vertical-align: top; }
  dl { display: grid; grid-template-columns: max-content 1fr; gap: .25rem 1rem; }
  dd { margin: 0; overflow-wrap: anywhere; }
  pre { white-space: pre-wrap; overflow-wrap: anywhere; border: 1px solid #8886; padding: 1rem; }
  iframe { width: 100%; height: 40rem; border: 1px solid #8886; background: #fff; }`

/** Newest first. */
export function listPage(mails: readonly Mail[]): string {
  const rows = [...mails].reverse().map(
    (mail) => `<tr>
      <td><time datetime="${mail.receivedAt}">${escapeHtml(clockTime(mail.receivedAt))}</time></td>
      <td>${escapeHtml(mail.deliveredTo.join(', '))}</td>
      <td><a href="/mails/${mail.id}">${escapeHtml(mail.subject || '(no subject)')}</a></td>
    </tr>`,
  )
  const table = `<table>
    <thead><tr><th scope="col">Received (UTC)</th><th scope="col">To</th><th scope="col">Subject</th></tr></thead>
    <tbody>${rows.join('')}</tbody>
  </table>`
  const none = '<p>No mail yet. Load this page again after Halyard sends one.</p>'
  return layout('Mail', `<h1>Mail that Halyard sent</h1>${rows.length > 0 ? table : none}`)
}

export function mailPage(mail: Mail): string {
  const facts = [
    ['Received', `${clockTime(mail.receivedAt)} UTC`],
    ['From', mail.from],
    ['To', mail.deliveredTo.join(', ')],
  ]
  const list = facts.map(([name, value]) => `<dt>${name}</dt><dd>${escapeHtml(value ?? '')}</dd>`).join('')
  const sandbox = 'sandbox="allow-popups allow-popups-to-escape-sandbox"'
  const html = mail.html
    ? `<h2>HTML part</h2><iframe title="HTML part of the mail" ${sandbox} src="/mails/${mail.id}/html"></iframe>`
    : ''
  const body = `<p><a href="/">All mail</a></p><h1>${escapeHtml(mail.subject || '(no subject)')}</h1><dl>${list}</dl>
    <h2>Text part</h2><pre>${linkAddresses(mail.text)}</pre>${html}`
  return layout(mail.subject, body)
}

/** Served under a sandboxing policy; a link in the mail opens in a new tab. */
export function sandboxedHtml(mail: Mail): string {
  return `<!doctype html><base target="_blank">${mail.html}`
}

export function escapeHtml(text: string): string {
  const entities: Record<string, string> = {
    '&': '&amp;',
    '<': '&lt;',
    '>': '&gt;',
    '"': '&quot;',
    "'": '&#39;',
  }
  return text.replace(/[&<>"']/g, (character) => entities[character] ?? character)
}

function linkAddresses(text: string): string {
  return escapeHtml(text).replace(
    /https?:\/\/[^\s<>()]+[^\s<>().,;:!?]/g,
    (address) => `<a href="${address}" target="_blank" rel="noreferrer">${address}</a>`,
  )
}

function clockTime(iso: string): string {
  return iso.slice(0, 19).replace('T', ' ')
}

function layout(title: string, body: string): string {
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width">
<title>${escapeHtml(title)}</title><style>${STYLE}</style></head><body>${body}</body></html>`
}

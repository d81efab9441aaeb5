/** One way into the demo group. */
export interface SignIn {
  address: string
  password: string
  role: string
}

export interface BannerFacts {
  url: string
  /** Null when mail really goes out. */
  mailUrl: string | null
  signIns: readonly SignIn[]
  /** Where data, mails and logs are: two folders where PostgreSQL's own user cannot reach the clone. */
  folders: readonly string[]
  /** False when a database that was named holds the data. */
  hasOwnData: boolean
}

/** What scripts/start says once everything runs. */
export function banner({ url, mailUrl, signIns, folders, hasOwnData }: BannerFacts): string {
  const width = Math.max(0, ...signIns.map(({ address }) => address.length))
  const people = signIns.map(
    ({ address, password, role }) => `    ${address.padEnd(width)}  ${password}  (${role})`,
  )
  return [
    '',
    'Halyard is up.',
    '',
    `  Open   ${url}`,
    ...(mailUrl ? [`  Mail   ${mailUrl}  (every mail that Halyard sends; none leaves this machine)`] : []),
    ...(people.length > 0 ? ['', '  Sign in as', ...people] : []),
    '',
    hasOwnData
      ? `  Data, mails and logs: ${folders.join(' and ')}  (remove to start afresh)`
      : `  Logs: ${folders[0]}`,
    '  Ctrl-C stops everything and keeps the data.',
    '',
  ].join('\n')
}

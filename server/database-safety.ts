import type { AppContext } from './context.ts'

interface Settings {
  fsync: string
  full_page_writes: string
  synchronous_commit: string
  data_checksums: string
  acts_as: string
  bypasses: boolean
  owns_tables: boolean
}

const READ = `
  SELECT current_setting('fsync') AS fsync, current_setting('full_page_writes') AS full_page_writes,
    current_setting('synchronous_commit') AS synchronous_commit, current_setting('data_checksums') AS data_checksums,
    current_user AS acts_as,
    (SELECT bool_or(rolsuper OR rolbypassrls) FROM pg_roles WHERE rolname IN (current_user, session_user)) AS bypasses,
    EXISTS (SELECT FROM pg_class WHERE relnamespace = 'public'::regnamespace AND relkind IN ('r', 'p')
      AND pg_get_userbyid(relowner) = current_user) AS owns_tables`

/**
 * What a production database lacks for us to trust it with records: one sentence per fault, none when all is well.
 * A crash may lose nothing that was acknowledged (promise P2), and row-level security must bind us (promise P13).
 */
export async function databaseFaults({ db }: AppContext): Promise<string[]> {
  const [settings] = await db.query<Settings[]>(READ)
  return settings ? faultsOf(settings) : ['The database does not answer about its settings.']
}

function faultsOf(settings: Settings): string[] {
  const mustBeOn = ['fsync', 'full_page_writes', 'data_checksums'] as const
  const faults = mustBeOn
    .filter((name) => settings[name] !== 'on')
    .map((name) => `${name} is off: a power cut could lose or damage records.`)
  if (settings.synchronous_commit === 'off')
    faults.push('synchronous_commit is off: a crash could lose what was acknowledged.')
  if (settings.bypasses)
    faults.push('DATABASE_URL signs in as a role that row-level security does not bind: use another role.')
  if (settings.owns_tables)
    faults.push(`The role ${settings.acts_as} owns the tables: the application must work as another role.`)
  return faults
}

import pg from 'pg'

export const ROLES = {
  super: 'postgres',
  owner: 'halyard_owner',
  app: 'halyard_app',
  backup: 'halyard_backup',
} as const
export type Role = keyof typeof ROLES

/**
 * Who may do what in the cluster. The owner makes the schema and is no superuser; the application is neither owner
 * nor superuser, so that row-level security binds it (promise P13); the backup role reads every group's rows, which
 * only a role that bypasses row-level security can, and writes nothing.
 */
const ATTRIBUTES = {
  owner: 'LOGIN CREATEROLE CREATEDB',
  app: 'LOGIN',
  backup: 'LOGIN BYPASSRLS',
} as const

/** Safe to run at each start: makes what is missing, and sets the passwords to the kept ones. */
export async function makeRolesAndDatabase(
  cluster: { url(role: Role, database?: string): string },
  passwords: Readonly<Record<Role, string>>,
): Promise<void> {
  const client = new pg.Client({ connectionString: cluster.url('super', 'postgres') })
  await client.connect()
  try {
    for (const role of ['owner', 'app', 'backup'] as const) {
      await makeRole(client, role, passwords[role])
    }
    await client.query(`GRANT pg_read_all_data TO ${ROLES.backup}`)
    // So that the owner may drop a database that somebody is still connected to.
    await client.query(`GRANT pg_signal_backend, ${ROLES.app} TO ${ROLES.owner}`)
    await makeDatabase(client)
  } finally {
    await client.end()
  }
}

async function makeRole(client: pg.Client, role: keyof typeof ATTRIBUTES, password: string): Promise<void> {
  const name = ROLES[role]
  const found = await client.query('SELECT 1 FROM pg_roles WHERE rolname = $1', [name])
  if (found.rowCount === 0) await client.query(`CREATE ROLE ${name}`)
  await client.query(`ALTER ROLE ${name} ${ATTRIBUTES[role]} PASSWORD ${client.escapeLiteral(password)}`)
}

async function makeDatabase(client: pg.Client): Promise<void> {
  const found = await client.query(`SELECT 1 FROM pg_database WHERE datname = 'halyard'`)
  if (found.rowCount === 0) await client.query(`CREATE DATABASE halyard OWNER ${ROLES.owner}`)
}

/** Small pieces of SQL that several migrations share, so that no table can forget its separation. */

/** The group set for this transaction by SET LOCAL, as one value per statement; no group set means no rows. */
const CURRENT_GROUP = `(select nullif(current_setting('halyard.group_id', true), '')::uuid)`

/**
 * Turns row-level security on, forced also for the owner. The application sees its own group only; the owner, who
 * runs migrations, backups and the few look-ups made before a group is known, has a policy of its own.
 */
export function separateByGroup(table: string, column = 'group_id'): string {
  return `
    ALTER TABLE ${table} ENABLE ROW LEVEL SECURITY;
    ALTER TABLE ${table} FORCE ROW LEVEL SECURITY;
    CREATE POLICY own_group ON ${table} TO halyard_app
      USING (${column} = ${CURRENT_GROUP}) WITH CHECK (${column} = ${CURRENT_GROUP});
    CREATE POLICY owner_all ON ${table} TO CURRENT_USER USING (true) WITH CHECK (true);`
}

/** What the application may do with a table; nothing is ever deleted where history hangs on it. */
export function grant(table: string, rights: string): string {
  return `GRANT ${rights} ON ${table} TO halyard_app;`
}

/** `group_id` and the key that lets children prove that they belong to the same group. */
export const GROUP_COLUMNS = `
    id uuid PRIMARY KEY,
    group_id uuid NOT NULL REFERENCES groups (id)`

/** A foreign key that cannot point into another group. */
export function sameGroup(column: string, table: string): string {
  return `FOREIGN KEY (group_id, ${column}) REFERENCES ${table} (group_id, id)`
}

import pg from 'pg'

export const BENCH_GROUP = '01990000-0000-7000-8000-00000000be00'
export const BENCH_MEMBER = '01990000-0000-7000-8000-00000000be01'

/**
 * A second group with 1,000 kits whose rows look like the demo's: copied by SQL, because what is measured is reading
 * them. Kits 0001 to 1000, each with the board row and the periods of a demo kit.
 */
export async function givenThousandKits(ownerUrl: string): Promise<void> {
  const client = new pg.Client({ connectionString: ownerUrl })
  await client.connect()
  try {
    await client.query(SQL)
    await client.query('ANALYZE')
  } finally {
    await client.end()
  }
}

const SQL = `
  INSERT INTO groups (id, name, short_name, time_zone, created_at)
    VALUES ('${BENCH_GROUP}', 'Bench group', 'Bench', 'UTC', now());
  INSERT INTO member (id, group_id, name, email, roles, created_at)
    VALUES ('${BENCH_MEMBER}', '${BENCH_GROUP}', 'Bench', 'bench@example.org', '{net-coordinator}', now());
  CREATE TEMP TABLE pairs AS
    SELECT n, gen_random_uuid() AS id, k.id AS old FROM generate_series(1, 1000) AS n
    JOIN (SELECT id, row_number() OVER (ORDER BY designation) - 1 AS place FROM kit) k ON k.place = n % 24;
  CREATE TEMP TABLE kinds AS SELECT id AS old, gen_random_uuid() AS id FROM kit_kind;
  INSERT INTO kit_kind (id, group_id, code, name, station, promise, created_at)
    SELECT n.id, '${BENCH_GROUP}', k.code, k.name, k.station, k.promise, k.created_at
    FROM kit_kind k JOIN kinds n ON n.old = k.id;
  INSERT INTO kit (id, group_id, tag, designation, kit_kind_id, availability, availability_reason, created_at)
    SELECT p.id, '${BENCH_GROUP}', 'BENCH' || p.n, 'B-' || lpad(p.n::text, 4, '0'), n.id, k.availability,
      k.availability_reason, k.created_at
    FROM pairs p JOIN kit k ON k.id = p.old JOIN kinds n ON n.old = k.kit_kind_id;
  INSERT INTO readiness_period (id, group_id, kit_id, during, verdict, availability, availability_reason, reasons,
      capability, digest, known_since)
    SELECT gen_random_uuid(), '${BENCH_GROUP}', p.id, r.during, r.verdict, r.availability, r.availability_reason,
      r.reasons, r.capability, r.digest, r.known_since
    FROM pairs p JOIN readiness_period r ON r.kit_id = p.old AND upper(r.during) > now();
  INSERT INTO board_row (kit_id, group_id, designation, station, verdict, verdict_rank, availability, reason_top,
      reason_n, holds_until, valid_until, band_codes, watts, hours, horizon, oldest_vital_on)
    SELECT p.id, '${BENCH_GROUP}', 'B-' || lpad(p.n::text, 4, '0'), b.station, b.verdict, b.verdict_rank,
      b.availability, b.reason_top, b.reason_n, b.holds_until, b.valid_until, b.band_codes, b.watts, b.hours,
      b.horizon, b.oldest_vital_on
    FROM pairs p JOIN board_row b ON b.kit_id = p.old;
  INSERT INTO board_count (group_id, station, availability, verdict, n)
    SELECT '${BENCH_GROUP}', station, availability, verdict, count(*) FROM board_row
    WHERE group_id = '${BENCH_GROUP}' GROUP BY 2, 3, 4;
  INSERT INTO board_revision (group_id, revision) VALUES ('${BENCH_GROUP}', 1);
  CREATE TABLE bench_record (id uuid PRIMARY KEY, item_id uuid, at timestamptz, inputs jsonb, findings jsonb);
  CREATE TABLE bench_newest (item_id uuid PRIMARY KEY, record_id uuid, at timestamptz);
  CREATE TABLE bench_state (kit_id uuid PRIMARY KEY, changed timestamptz, digest text);
  INSERT INTO bench_state SELECT id, now(), '' FROM kit;`

import type { MigrationInterface, QueryRunner } from 'typeorm'
import { GROUP_COLUMNS, grant, sameGroup, separateByGroup } from './sql.ts'

const CATEGORIES = `category ~ '^[a-z][a-z-]{1,39}$'`
const RETIREMENT = `
      version int NOT NULL DEFAULT 1,
      created_at timestamptz NOT NULL,
      retired_at timestamptz,
      retired_reason text CHECK (length(retired_reason) BETWEEN 1 AND 500),
      CHECK ((retired_at IS NULL) = (retired_reason IS NULL)),
      UNIQUE (group_id, id)`

const table = (name: string, columns: string, rights = 'SELECT, INSERT, UPDATE') => `
    CREATE TABLE ${name} (${GROUP_COLUMNS}, ${columns});
    ${separateByGroup(name)}
    ${grant(name, rights)}`

/** Places, kit kinds with load plans, kits, items, builds, consumables, movements and printed tags. */
export class CreateRegistry1796000100000 implements MigrationInterface {
  name = 'CreateRegistry1796000100000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
    CREATE SEQUENCE tag_serial;
    GRANT USAGE ON SEQUENCE tag_serial TO halyard_app;

    ${table(
      'place',
      `
      name text NOT NULL CHECK (length(name) BETWEEN 1 AND 120),
      kind text NOT NULL DEFAULT '' CHECK (length(kind) <= 80),
      min_c numeric(5,1), max_c numeric(5,1), CHECK (min_c <= max_c),
      access text NOT NULL DEFAULT '' CHECK (length(access) <= 500),
      key_holders text NOT NULL DEFAULT '' CHECK (length(key_holders) <= 500),
      ${RETIREMENT}`,
    )}
    CREATE UNIQUE INDEX place_name ON place (group_id, lower(name)) WHERE retired_at IS NULL;

    ${table(
      'kit_kind',
      `
      code text NOT NULL CHECK (length(code) BETWEEN 1 AND 12),
      name text NOT NULL CHECK (length(name) BETWEEN 1 AND 120),
      station boolean NOT NULL,
      promise jsonb NOT NULL,
      ${RETIREMENT}`,
    )}
    CREATE UNIQUE INDEX kit_kind_code ON kit_kind (group_id, lower(code)) WHERE retired_at IS NULL;

    ${table(
      'position',
      `
      kit_kind_id uuid NOT NULL,
      ordinal int NOT NULL CHECK (ordinal BETWEEN 1 AND 200),
      name text NOT NULL CHECK (length(name) BETWEEN 1 AND 80),
      category text NOT NULL CHECK (${CATEGORIES}),
      quantity int NOT NULL DEFAULT 1 CHECK (quantity BETWEEN 1 AND 50),
      vital boolean NOT NULL,
      requires jsonb NOT NULL DEFAULT '{}',
      removed_at timestamptz,
      UNIQUE (group_id, id),
      ${sameGroup('kit_kind_id', 'kit_kind')}`,
    )}
    CREATE INDEX position_kit_kind ON position (group_id, kit_kind_id, ordinal);

    ${table(
      'kit',
      `
      tag text NOT NULL UNIQUE,
      designation text NOT NULL CHECK (length(designation) BETWEEN 1 AND 24),
      kit_kind_id uuid NOT NULL,
      home_place_id uuid,
      place_id uuid,
      availability text NOT NULL DEFAULT 'available' CHECK (availability IN ('available', 'assigned', 'out-of-service')),
      availability_reason text NOT NULL DEFAULT '' CHECK (length(availability_reason) <= 300),
      expected_return_on date,
      holder_id uuid,
      responsible_id uuid,
      seal_number text CHECK (length(seal_number) <= 40),
      seal_matches boolean NOT NULL DEFAULT true,
      notes text NOT NULL DEFAULT '' CHECK (length(notes) <= 4000),
      ${RETIREMENT},
      ${sameGroup('kit_kind_id', 'kit_kind')},
      ${sameGroup('home_place_id', 'place')},
      ${sameGroup('place_id', 'place')},
      ${sameGroup('holder_id', 'member')},
      ${sameGroup('responsible_id', 'member')}`,
    )}
    CREATE UNIQUE INDEX kit_designation ON kit (group_id, lower(designation));
    CREATE INDEX kit_kind_of ON kit (group_id, kit_kind_id);

    ${table(
      'build_sheet',
      `
      name text NOT NULL CHECK (length(name) BETWEEN 1 AND 120),
      category text NOT NULL CHECK (${CATEGORIES}),
      details jsonb NOT NULL,
      notes text NOT NULL DEFAULT '' CHECK (length(notes) <= 4000),
      ${RETIREMENT}`,
    )}
    CREATE UNIQUE INDEX build_sheet_name ON build_sheet (group_id, lower(name)) WHERE retired_at IS NULL;

    ${table(
      'batch',
      `
      build_sheet_id uuid NOT NULL,
      name text NOT NULL CHECK (length(name) BETWEEN 1 AND 60),
      core_lot text NOT NULL DEFAULT '' CHECK (length(core_lot) <= 60),
      built_on date,
      builder_id uuid,
      notes text NOT NULL DEFAULT '' CHECK (length(notes) <= 4000),
      ${RETIREMENT},
      ${sameGroup('build_sheet_id', 'build_sheet')},
      ${sameGroup('builder_id', 'member')}`,
    )}
    CREATE UNIQUE INDEX batch_name ON batch (group_id, lower(name)) WHERE retired_at IS NULL;

    ${table(
      'item',
      `
      tag text NOT NULL UNIQUE,
      designation text NOT NULL CHECK (length(designation) BETWEEN 1 AND 24),
      category text NOT NULL CHECK (${CATEGORIES}),
      kit_id uuid, position_id uuid, place_id uuid,
      maker text NOT NULL DEFAULT '' CHECK (length(maker) <= 80),
      model text NOT NULL DEFAULT '' CHECK (length(model) <= 80),
      serial text CHECK (length(serial) BETWEEN 1 AND 80),
      accountability text NOT NULL DEFAULT 'durable' CHECK (accountability IN ('accountable', 'durable', 'expendable')),
      condition text NOT NULL DEFAULT 'serviceable'
        CHECK (condition IN ('serviceable', 'unserviceable', 'missing', 'away')),
      condition_reason text NOT NULL DEFAULT '' CHECK (length(condition_reason) <= 300),
      owner_id uuid,
      details jsonb NOT NULL,
      build_sheet_id uuid, batch_id uuid,
      acquired_on date,
      weight_kg numeric(7,3) CHECK (weight_kg >= 0),
      notes text NOT NULL DEFAULT '' CHECK (length(notes) <= 4000),
      ${RETIREMENT},
      CHECK ((kit_id IS NULL) = (position_id IS NULL)),
      CHECK (kit_id IS NULL OR place_id IS NULL),
      CHECK (retired_at IS NULL OR kit_id IS NULL),
      ${sameGroup('kit_id', 'kit')},
      ${sameGroup('position_id', 'position')},
      ${sameGroup('place_id', 'place')},
      ${sameGroup('owner_id', 'member')},
      ${sameGroup('build_sheet_id', 'build_sheet')},
      ${sameGroup('batch_id', 'batch')}`,
    )}
    CREATE UNIQUE INDEX item_designation ON item (group_id, lower(designation)) WHERE retired_at IS NULL;
    CREATE UNIQUE INDEX item_serial ON item (group_id, lower(maker), lower(model), lower(serial)) WHERE serial IS NOT NULL;
    CREATE INDEX item_kit ON item (kit_id) WHERE kit_id IS NOT NULL;
    CREATE INDEX item_category ON item (group_id, category, designation);
    CREATE INDEX item_batch ON item (group_id, batch_id) WHERE batch_id IS NOT NULL;
    CREATE INDEX item_place ON item (group_id, place_id) WHERE place_id IS NOT NULL;

    ${table(
      'movement',
      `
      item_id uuid NOT NULL,
      from_kit_id uuid, from_position_id uuid, from_place_id uuid,
      to_kit_id uuid, to_position_id uuid, to_place_id uuid,
      moved_at timestamptz NOT NULL,
      reason text NOT NULL DEFAULT '' CHECK (length(reason) <= 300),
      moved_by uuid,
      ${sameGroup('item_id', 'item')},
      ${sameGroup('from_kit_id', 'kit')}, ${sameGroup('from_position_id', 'position')}, ${sameGroup('from_place_id', 'place')},
      ${sameGroup('to_kit_id', 'kit')}, ${sameGroup('to_position_id', 'position')}, ${sameGroup('to_place_id', 'place')},
      ${sameGroup('moved_by', 'member')}`,
      'SELECT, INSERT',
    )}
    CREATE INDEX movement_item ON movement (group_id, item_id, moved_at DESC);

    ${table(
      'consumable',
      `
      name text NOT NULL CHECK (length(name) BETWEEN 1 AND 120),
      unit text NOT NULL CHECK (length(unit) BETWEEN 1 AND 20),
      minimum numeric(12,3) NOT NULL CHECK (minimum >= 0),
      place_id uuid,
      notes text NOT NULL DEFAULT '' CHECK (length(notes) <= 2000),
      ${RETIREMENT},
      ${sameGroup('place_id', 'place')}`,
    )}
    CREATE UNIQUE INDEX consumable_name ON consumable (group_id, lower(name)) WHERE retired_at IS NULL;

    ${table(
      'consumable_lot',
      `
      consumable_id uuid NOT NULL,
      name text NOT NULL DEFAULT '' CHECK (length(name) <= 60),
      quantity numeric(12,3) NOT NULL DEFAULT 0 CHECK (quantity >= 0),
      use_by_on date,
      condition text NOT NULL DEFAULT '' CHECK (length(condition) <= 200),
      created_at timestamptz NOT NULL,
      UNIQUE (group_id, id),
      UNIQUE (consumable_id, name),
      ${sameGroup('consumable_id', 'consumable')}`,
    )}

    ${table(
      'stock_change',
      `
      lot_id uuid NOT NULL,
      difference numeric(12,3) NOT NULL CHECK (difference <> 0),
      reason text NOT NULL CHECK (length(reason) BETWEEN 1 AND 300),
      changed_at timestamptz NOT NULL,
      changed_by uuid,
      ${sameGroup('lot_id', 'consumable_lot')},
      ${sameGroup('changed_by', 'member')}`,
      'SELECT, INSERT',
    )}
    CREATE INDEX stock_change_lot ON stock_change (group_id, lot_id, changed_at DESC);

    ${table(
      'tag_print',
      `
      kit_id uuid, item_id uuid,
      printed_at timestamptz NOT NULL,
      printed_by uuid,
      CHECK ((kit_id IS NULL) <> (item_id IS NULL)),
      ${sameGroup('kit_id', 'kit')}, ${sameGroup('item_id', 'item')}, ${sameGroup('printed_by', 'member')}`,
      'SELECT, INSERT',
    )}
    CREATE INDEX tag_print_kit ON tag_print (group_id, kit_id) WHERE kit_id IS NOT NULL;
    CREATE INDEX tag_print_item ON tag_print (group_id, item_id) WHERE item_id IS NOT NULL;
    `)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`
    DROP TABLE tag_print, stock_change, consumable_lot, consumable, movement, item, batch, build_sheet, kit,
      position, kit_kind, place;
    DROP SEQUENCE tag_serial;
    `)
  }
}

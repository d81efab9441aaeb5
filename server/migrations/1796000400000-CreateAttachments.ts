import type { MigrationInterface, QueryRunner } from 'typeorm'
import { GROUP_COLUMNS, grant, sameGroup, separateByGroup } from './sql.ts'

/**
 * Files of tests, kept in the database so that one backup holds everything, and what was known when a test was judged,
 * so that its result can be derived again after an instrument or an item has been edited.
 */
export class CreateAttachments1796000400000 implements MigrationInterface {
  name = 'CreateAttachments1796000400000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
    CREATE TABLE attachment (${GROUP_COLUMNS},
      kind text NOT NULL CHECK (kind IN ('touchstone', 'csv', 'photo', 'certificate')),
      name text NOT NULL CHECK (length(name) BETWEEN 1 AND 120),
      media_type text NOT NULL CHECK (length(media_type) BETWEEN 3 AND 100),
      size int NOT NULL CHECK (size BETWEEN 1 AND 11000000),
      -- Of what was sent: the same bytes again are the same success, also where a picture was made clean.
      sent_sha256 bytea NOT NULL CHECK (length(sent_sha256) = 32),
      content bytea NOT NULL,
      uploaded_at timestamptz NOT NULL,
      uploaded_by uuid,
      UNIQUE (group_id, id),
      CHECK (length(content) = size),
      ${sameGroup('uploaded_by', 'member')}
    );
    ${separateByGroup('attachment')}
    ${grant('attachment', 'SELECT, INSERT, DELETE')}
    CREATE INDEX attachment_uploaded ON attachment (group_id, uploaded_at);

    CREATE TABLE test_attachment (
      test_id uuid NOT NULL,
      attachment_id uuid NOT NULL,
      group_id uuid NOT NULL REFERENCES groups (id),
      role text NOT NULL CHECK (role IN ('file', 'open', 'short', 'load', 'attached')),
      ordinal int NOT NULL CHECK (ordinal BETWEEN 0 AND 20),
      PRIMARY KEY (test_id, attachment_id),
      ${sameGroup('test_id', 'test')}, ${sameGroup('attachment_id', 'attachment')}
    );
    ${separateByGroup('test_attachment')}
    ${grant('test_attachment', 'SELECT, INSERT')}
    CREATE INDEX test_attachment_file ON test_attachment (attachment_id);

    ALTER TABLE test ADD COLUMN known jsonb;
    `)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`
      ALTER TABLE test DROP COLUMN known;
      DROP TABLE test_attachment, attachment;`)
  }
}

import type { MigrationInterface, QueryRunner } from 'typeorm'

/** Where a farmer's leaf goes, and which record's leaf went with which mail: one mail a version. */
export class Leaves1764590500000 implements MigrationInterface {
  name = 'Leaves1764590500000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      ALTER TABLE farmers ADD email text NOT NULL DEFAULT '';
      CREATE TABLE leaves (
        record_number integer NOT NULL, record_version integer NOT NULL,
        mail_id uuid NOT NULL UNIQUE REFERENCES mails (id), sent_by uuid NOT NULL REFERENCES users (id),
        PRIMARY KEY (record_number, record_version),
        FOREIGN KEY (record_number, record_version) REFERENCES records (number, version)
      );
    `)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE leaves; ALTER TABLE farmers DROP email;')
  }
}

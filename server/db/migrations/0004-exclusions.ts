import type { MigrationInterface, QueryRunner } from 'typeorm'

/** Runs a person left out of comparisons, and took back. Lines are added and none is changed; the latest of a record counts. */
export class Exclusions1764590300000 implements MigrationInterface {
  name = 'Exclusions1764590300000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE exclusions (
        id bigint GENERATED ALWAYS AS IDENTITY PRIMARY KEY, record_number integer NOT NULL,
        act text NOT NULL CHECK (act IN ('left out', 'taken back')), reason text NOT NULL,
        by_id uuid NOT NULL REFERENCES users (id), at timestamptz NOT NULL DEFAULT now()
      );
      CREATE INDEX exclusions_by_record ON exclusions (record_number, id);
      CREATE FUNCTION exclusions_stand() RETURNS trigger LANGUAGE plpgsql AS $$
      BEGIN RAISE EXCEPTION 'the exclusion log can only be added to'; END $$;
      CREATE TRIGGER exclusions_no_change BEFORE UPDATE OR DELETE ON exclusions FOR EACH ROW EXECUTE FUNCTION exclusions_stand();
      CREATE TRIGGER exclusions_no_truncate BEFORE TRUNCATE ON exclusions FOR EACH STATEMENT EXECUTE FUNCTION exclusions_stand();
    `)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE exclusions; DROP FUNCTION exclusions_stand();')
  }
}

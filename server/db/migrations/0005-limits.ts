import type { MigrationInterface, QueryRunner } from 'typeorm'

/**
 * Limits of the rules by version, local units of land, and what the formulas ask of the registers. Versions and units are added
 * and none is changed: a record names the version that judged it.
 */
export class Limits1764590400000 implements MigrationInterface {
  name = 'Limits1764590400000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE TABLE limit_settings (
        version integer PRIMARY KEY, limits jsonb NOT NULL, why text NOT NULL,
        set_by uuid NOT NULL REFERENCES users (id), set_at timestamptz NOT NULL DEFAULT now()
      );
      CREATE TABLE land_units (
        id uuid PRIMARY KEY DEFAULT gen_random_uuid(), name text NOT NULL, district text NOT NULL,
        size_m2 double precision NOT NULL CHECK (size_m2 > 0), source text NOT NULL,
        confirmed_by uuid NOT NULL REFERENCES users (id), confirmed_at timestamptz NOT NULL DEFAULT now(),
        withdrawn_by uuid REFERENCES users (id), withdrawn_at timestamptz
      );
      CREATE UNIQUE INDEX land_units_once ON land_units (lower(name), lower(district)) WHERE withdrawn_at IS NULL;
      ALTER TABLE places ADD lat double precision, ADD lon double precision, ADD density15_kgm3 double precision;
      ALTER TABLE tractors ADD rolling_circumference_m double precision, ADD gear_speeds text NOT NULL DEFAULT '';
      ALTER TABLE kits ADD scale_pct double precision;
    `)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`
      DROP TABLE limit_settings; DROP TABLE land_units;
      ALTER TABLE places DROP lat, DROP lon, DROP density15_kgm3;
      ALTER TABLE tractors DROP rolling_circumference_m, DROP gear_speeds;
      ALTER TABLE kits DROP scale_pct;
    `)
  }
}

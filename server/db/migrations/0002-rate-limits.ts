import type { MigrationInterface, QueryRunner } from 'typeorm'

/** Counters of attempts, shared by every process. Unlogged: after a crash of the database counting starts afresh. */
export class RateLimits1764590100000 implements MigrationInterface {
  name = 'RateLimits1764590100000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
      CREATE UNLOGGED TABLE rate_limits (key varchar(255) PRIMARY KEY, points integer NOT NULL DEFAULT 0, expire bigint);
      CREATE INDEX rate_limits_by_expiry ON rate_limits (expire);
    `)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE rate_limits')
  }
}

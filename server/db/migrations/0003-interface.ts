import type { MigrationInterface, QueryRunner } from 'typeorm'

const TOKENS = `
CREATE TABLE api_tokens (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(), user_id uuid NOT NULL REFERENCES users (id),
  name text NOT NULL, ending text NOT NULL, token_hash text NOT NULL UNIQUE, scopes text[] NOT NULL,
  created_at timestamptz NOT NULL DEFAULT now(), expires_at timestamptz NOT NULL, last_used_at timestamptz, revoked_at timestamptz
);
CREATE INDEX api_tokens_by_user ON api_tokens (user_id, created_at);`

/**
 * A change gets its position at the very end of its transaction, under a lock that is held until the change can be seen: so
 * positions come into sight in their order, and who has read up to one has missed nothing before it. Waiting for the end also
 * makes the lock the last one taken, so it cannot be part of a deadlock.
 */
const CHANGES = `
CREATE SEQUENCE book_change_position;
CREATE TABLE book_changes (
  position bigint PRIMARY KEY, number integer NOT NULL, version integer NOT NULL,
  what text NOT NULL CHECK (what IN ('entered', 'changed', 'withdrawn')), at timestamptz NOT NULL DEFAULT now()
);
CREATE FUNCTION book_changed() RETURNS trigger LANGUAGE plpgsql AS $$
DECLARE
  line records := CASE TG_OP WHEN 'DELETE' THEN OLD ELSE NEW END;
  happened text;
BEGIN
  -- an older version steps back: the line of the newer one says so
  IF TG_OP = 'UPDATE' AND NEW.state = 'superseded' THEN RETURN NULL; END IF;
  happened := CASE
    WHEN TG_OP = 'DELETE' AND NOT EXISTS (SELECT FROM records WHERE number = line.number AND state <> 'superseded') THEN 'withdrawn'
    WHEN TG_OP = 'INSERT' AND line.version = 1 THEN 'entered'
    ELSE 'changed' END;
  PERFORM pg_advisory_xact_lock(hashtextextended('book_changes', 0));
  INSERT INTO book_changes (position, number, version, what)
    VALUES (nextval('book_change_position'), line.number, line.version, happened);
  RETURN NULL;
END $$;
CREATE CONSTRAINT TRIGGER book_changed AFTER INSERT OR UPDATE OR DELETE ON records
  DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION book_changed();
INSERT INTO book_changes (position, number, version, what, at)
  SELECT nextval('book_change_position'), number, version, CASE version WHEN 1 THEN 'entered' ELSE 'changed' END, entered_at
  FROM records ORDER BY entered_at, number, version;`

const WEBHOOKS = `
CREATE TABLE webhooks (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(), user_id uuid NOT NULL REFERENCES users (id),
  url text NOT NULL, events text[] NOT NULL,
  -- in clear: it is what every message is signed with
  secret text NOT NULL,
  state text NOT NULL DEFAULT 'active' CHECK (state IN ('active', 'paused')), paused_because text,
  created_at timestamptz NOT NULL DEFAULT now(), last_delivered_at timestamptz
);
CREATE INDEX webhooks_by_user ON webhooks (user_id, created_at);
CREATE TABLE webhook_deliveries (
  id uuid PRIMARY KEY, webhook_id uuid NOT NULL REFERENCES webhooks (id) ON DELETE CASCADE,
  event text NOT NULL,
  -- as text: the signature is over its very bytes, the same at every attempt
  payload text NOT NULL,
  state text NOT NULL DEFAULT 'waiting' CHECK (state IN ('waiting', 'delivered', 'failed')),
  attempts integer NOT NULL DEFAULT 0, status integer, trouble text,
  created_at timestamptz NOT NULL DEFAULT now(), last_at timestamptz
);
CREATE INDEX webhook_deliveries_by_webhook ON webhook_deliveries (webhook_id, created_at);`

/** What programs need: tokens, the change feed, webhooks. */
export class Interface1764590200000 implements MigrationInterface {
  name = 'Interface1764590200000'

  async up(runner: QueryRunner): Promise<void> {
    for (const part of [TOKENS, CHANGES, WEBHOOKS]) await runner.query(part)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`
      DROP TABLE webhook_deliveries, webhooks, book_changes, api_tokens;
      DROP TRIGGER book_changed ON records;
      DROP FUNCTION book_changed();
      DROP SEQUENCE book_change_position;
    `)
  }
}

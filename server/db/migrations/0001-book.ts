import type { MigrationInterface, QueryRunner } from 'typeorm'

const PEOPLE = `
CREATE TABLE users (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(),
  number integer NOT NULL UNIQUE CHECK (number BETWEEN 1 AND 9999),
  name text NOT NULL, email text NOT NULL UNIQUE CHECK (email = lower(email)),
  role text NOT NULL CHECK (role IN ('demonstrator', 'clerk', 'analyst', 'admin')),
  password_hash text, active boolean NOT NULL DEFAULT true,
  created_at timestamptz NOT NULL DEFAULT now()
);
CREATE TABLE user_links (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(),
  user_id uuid REFERENCES users (id),
  kind text NOT NULL CHECK (kind IN ('invitation', 'reset', 'first admin')),
  token_hash text NOT NULL UNIQUE, expires_at timestamptz NOT NULL, used_at timestamptz,
  created_at timestamptz NOT NULL DEFAULT now()
);
CREATE TABLE session (sid text PRIMARY KEY, sess json NOT NULL, expire timestamptz NOT NULL);
CREATE INDEX session_expire ON session (expire);
CREATE TABLE farmers (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(),
  name text NOT NULL, phone text NOT NULL DEFAULT '', created_at timestamptz NOT NULL DEFAULT now()
);`

const REGISTERS = `
CREATE TABLE places (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(), number integer NOT NULL UNIQUE CHECK (number BETWEEN 1 AND 9999),
  name text NOT NULL, district text NOT NULL, active boolean NOT NULL DEFAULT true, version integer NOT NULL DEFAULT 1
);
CREATE TABLE tractors (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(), number integer NOT NULL UNIQUE CHECK (number BETWEEN 1 AND 9999),
  name text NOT NULL, serial text NOT NULL UNIQUE, rated_power_kw double precision NOT NULL, pto_power_kw double precision NOT NULL,
  rated_rpm integer NOT NULL, drive text NOT NULL, hour_meter_kind text NOT NULL,
  tyre_front text NOT NULL DEFAULT '', tyre_rear text NOT NULL DEFAULT '',
  ballast_front_kg double precision NOT NULL DEFAULT 0, ballast_rear_kg double precision NOT NULL DEFAULT 0,
  active boolean NOT NULL DEFAULT true, version integer NOT NULL DEFAULT 1
);
CREATE TABLE implements (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(), number integer NOT NULL UNIQUE CHECK (number BETWEEN 1 AND 9999),
  name text NOT NULL, operation text NOT NULL, rated_width_m double precision NOT NULL, tool_count integer NOT NULL,
  max_depth_cm double precision NOT NULL, active boolean NOT NULL DEFAULT true, version integer NOT NULL DEFAULT 1
);
CREATE TABLE kits (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(), number integer NOT NULL UNIQUE CHECK (number BETWEEN 1 AND 9999),
  name text NOT NULL, jar_serial text NOT NULL, jar_capacity_ml integer NOT NULL, jar_mark_ml integer NOT NULL,
  jug_serial text NOT NULL, jug_capacity_ml integer NOT NULL, jug_mark_ml integer NOT NULL,
  tape_serial text NOT NULL DEFAULT '', gauge_serial text NOT NULL DEFAULT '', rule_length_cm double precision NOT NULL DEFAULT 30,
  checked_on date NOT NULL, active boolean NOT NULL DEFAULT true, version integer NOT NULL DEFAULT 1
);`

const PLAN = `
CREATE TABLE demonstrations (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(), held_on date NOT NULL,
  place_id uuid NOT NULL REFERENCES places (id), demonstrator_id uuid NOT NULL REFERENCES users (id),
  driver text NOT NULL DEFAULT '', farmer_id uuid REFERENCES farmers (id) ON DELETE SET NULL,
  created_at timestamptz NOT NULL DEFAULT now(), version integer NOT NULL DEFAULT 1
);
CREATE INDEX demonstrations_by_demonstrator ON demonstrations (demonstrator_id, held_on);
CREATE TABLE trials (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(),
  demonstration_id uuid NOT NULL REFERENCES demonstrations (id) ON DELETE CASCADE, position integer NOT NULL,
  tractor_id uuid NOT NULL REFERENCES tractors (id), implement_id uuid NOT NULL REFERENCES implements (id),
  kit_id uuid NOT NULL REFERENCES kits (id), plot text NOT NULL, UNIQUE (demonstration_id, position)
);
CREATE TABLE runs (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(),
  trial_id uuid NOT NULL REFERENCES trials (id) ON DELETE CASCADE, number integer NOT NULL, UNIQUE (trial_id, number)
);`

const SHEETS = `
CREATE TABLE sheets (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(),
  code text, layout_key text, layout_version integer, planned boolean NOT NULL DEFAULT false,
  run_id uuid REFERENCES runs (id), state text NOT NULL, origin text,
  owner_id uuid REFERENCES users (id), facts jsonb NOT NULL DEFAULT '{}',
  open_doubts integer NOT NULL DEFAULT 0, stops integer NOT NULL DEFAULT 0, first_doubt text,
  held_by uuid REFERENCES users (id), held_since timestamptz, held_until timestamptz,
  sent_back_reason text, reason text, answered boolean NOT NULL DEFAULT false,
  arrived_at timestamptz, entered_at timestamptz, created_at timestamptz NOT NULL DEFAULT now(),
  version integer NOT NULL DEFAULT 1,
  CHECK (state IN ('printed', 'arrived', 'being read', 'waiting', 'sent back', 'settled', 'entered', 'challenged', 'set aside', 'unreadable'))
);
CREATE INDEX sheets_by_code ON sheets (code);
CREATE INDEX sheets_by_state ON sheets (state, arrived_at, id);
CREATE INDEX sheets_by_owner ON sheets (owner_id, arrived_at);
CREATE TABLE uploads (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(),
  uploaded_by uuid NOT NULL REFERENCES users (id), file_name text NOT NULL, kind text, bytes bigint NOT NULL,
  sha256 text NOT NULL, storage_key text, state text NOT NULL, reason text, received_at timestamptz NOT NULL DEFAULT now(),
  for_sheet_id uuid REFERENCES sheets (id),
  CHECK (state IN ('arrived', 'being read', 'done', 'not accepted'))
);
CREATE UNIQUE INDEX uploads_once ON uploads (sha256) WHERE state <> 'not accepted';
CREATE TABLE pages (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(),
  upload_id uuid NOT NULL REFERENCES uploads (id) ON DELETE CASCADE, number integer NOT NULL,
  sheet_id uuid REFERENCES sheets (id), state text NOT NULL DEFAULT 'arrived',
  attempt_token uuid, attempts integer NOT NULL DEFAULT 0,
  block jsonb, placed jsonb, reading jsonb, take_again jsonb, picture_key text, problem text, read_at timestamptz,
  UNIQUE (upload_id, number),
  CHECK (state IN ('arrived', 'being read', 'read', 'take again', 'unreadable'))
);
CREATE INDEX pages_by_sheet ON pages (sheet_id);
CREATE TABLE readings (
  sheet_id uuid NOT NULL REFERENCES sheets (id) ON DELETE CASCADE, key text NOT NULL,
  value jsonb, read_value jsonb, unit text,
  state text NOT NULL CHECK (state IN ('clear', 'in doubt')), origin text NOT NULL CHECK (origin IN ('ink', 'spreadsheet', 'person', 'plan')),
  candidates jsonb NOT NULL DEFAULT '[]', reasons jsonb NOT NULL DEFAULT '[]', page_id uuid REFERENCES pages (id), cell_ref text,
  settlement text, settled_by uuid REFERENCES users (id), settled_at timestamptz, why text,
  PRIMARY KEY (sheet_id, key)
);
CREATE TABLE doubts (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(),
  sheet_id uuid NOT NULL REFERENCES sheets (id) ON DELETE CASCADE,
  -- rule, cells and the numbers compared: a doubt settled on one set of numbers opens again on another
  fingerprint text NOT NULL, rule text NOT NULL, rule_version integer NOT NULL,
  severity text NOT NULL CHECK (severity IN ('stop', 'doubt', 'note')), cells text[] NOT NULL, text text NOT NULL,
  compared jsonb NOT NULL DEFAULT '{}', position integer NOT NULL DEFAULT 0, standing boolean NOT NULL DEFAULT true,
  settled_by uuid REFERENCES users (id), settled_at timestamptz, why text,
  UNIQUE (sheet_id, fingerprint)
);`

const BOOK = `
CREATE SEQUENCE record_number;
CREATE TABLE records (
  number integer NOT NULL, version integer NOT NULL, sheet_id uuid NOT NULL REFERENCES sheets (id),
  state text NOT NULL CHECK (state IN ('entered', 'challenged', 'superseded')),
  trial_date date, place_id uuid REFERENCES places (id), demonstrator_id uuid REFERENCES users (id),
  tractor_id uuid REFERENCES tractors (id), implement_id uuid REFERENCES implements (id), kit_id uuid REFERENCES kits (id),
  gear text, soil_class text, readings jsonb NOT NULL, results jsonb NOT NULL, notes jsonb NOT NULL DEFAULT '[]', facts jsonb NOT NULL,
  rules_version text NOT NULL, formula_version text NOT NULL, entered_by uuid NOT NULL REFERENCES users (id),
  entered_at timestamptz NOT NULL DEFAULT now(),
  challenged_by uuid REFERENCES users (id), challenged_at timestamptz, challenge_reason text,
  PRIMARY KEY (number, version), UNIQUE (sheet_id, version)
);
CREATE INDEX records_by_date ON records (trial_date, number);
CREATE TABLE mails (
  id uuid PRIMARY KEY DEFAULT gen_random_uuid(), recipient text NOT NULL, subject text NOT NULL, body text NOT NULL,
  state text NOT NULL DEFAULT 'queued' CHECK (state IN ('queued', 'sent', 'failed')), error text,
  created_at timestamptz NOT NULL DEFAULT now(), sent_at timestamptz
);`

/** Row and statement triggers: row triggers alone do not stop TRUNCATE. The chain makes a change by the owner visible. */
const TRAIL = `
CREATE TABLE trail (
  id bigint GENERATED ALWAYS AS IDENTITY PRIMARY KEY, at timestamptz NOT NULL DEFAULT now(),
  actor_id uuid, who text NOT NULL, action text NOT NULL, subject text NOT NULL, subject_id uuid,
  key text, text text NOT NULL, details jsonb NOT NULL DEFAULT '{}', previous_hash text, hash text NOT NULL DEFAULT ''
);
CREATE INDEX trail_by_subject ON trail (subject_id, id);
CREATE FUNCTION trail_chain() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  PERFORM pg_advisory_xact_lock(hashtextextended(NEW.subject || coalesce(NEW.subject_id::text, ''), 0));
  SELECT hash INTO NEW.previous_hash FROM trail
    WHERE subject = NEW.subject AND subject_id IS NOT DISTINCT FROM NEW.subject_id ORDER BY id DESC LIMIT 1;
  NEW.hash := encode(sha256(convert_to(concat_ws('|', coalesce(NEW.previous_hash, ''), NEW.id, extract(epoch FROM NEW.at),
    NEW.actor_id, NEW.who, NEW.action, NEW.subject, NEW.subject_id, NEW.key, NEW.text, NEW.details), 'UTF8')), 'hex');
  RETURN NEW;
END $$;
CREATE TRIGGER trail_chain BEFORE INSERT ON trail FOR EACH ROW EXECUTE FUNCTION trail_chain();
CREATE FUNCTION trail_stands() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN RAISE EXCEPTION 'the trail can only be added to'; END $$;
CREATE TRIGGER trail_no_change BEFORE UPDATE OR DELETE ON trail FOR EACH ROW EXECUTE FUNCTION trail_stands();
CREATE TRIGGER trail_no_truncate BEFORE TRUNCATE ON trail FOR EACH STATEMENT EXECUTE FUNCTION trail_stands();`

export class Book1764590000000 implements MigrationInterface {
  name = 'Book1764590000000'

  async up(runner: QueryRunner): Promise<void> {
    for (const part of [PEOPLE, REGISTERS, PLAN, SHEETS, BOOK, TRAIL]) await runner.query(part)
  }

  async down(): Promise<void> {
    throw new Error('the book cannot be unmade: restore a backup instead')
  }
}

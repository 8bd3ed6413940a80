import type { QueryInterface } from 'sequelize';

/**
 * One hash chain per team: hash = SHA-256(previous hash ‖ canonical text). The database itself checks that a
 * new entry is the next link, that its hash is right and that its columns say what the hashed text says.
 * `project_id` references nothing: an entry outlives what it tells of.
 */
const UP = `
  CREATE TABLE audit_entries (
    id uuid PRIMARY KEY,
    team_id uuid NOT NULL REFERENCES teams,
    sequence integer NOT NULL,
    at timestamptz NOT NULL,
    actor_id uuid REFERENCES people,
    project_id uuid,
    action text NOT NULL,
    canonical text NOT NULL,
    previous_hash text NOT NULL,
    hash text NOT NULL,
    UNIQUE (team_id, sequence)
  );
  CREATE INDEX audit_entries_project ON audit_entries (project_id, sequence DESC);

  CREATE FUNCTION check_audit_entry() RETURNS trigger
    LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
  DECLARE
    head audit_heads;
    said jsonb := NEW.canonical::jsonb;
  BEGIN
    SELECT * INTO head FROM audit_heads WHERE team_id = NEW.team_id FOR UPDATE;
    IF NOT FOUND OR NEW.sequence <> head.sequence + 1 OR NEW.previous_hash <> head.hash THEN
      RAISE EXCEPTION 'an audit entry has to be the next link of its chain'
        USING ERRCODE = 'integrity_constraint_violation';
    END IF;
    IF NEW.hash <> encode(sha256(convert_to(NEW.previous_hash || NEW.canonical, 'UTF8')), 'hex') THEN
      RAISE EXCEPTION 'the hash of an audit entry does not belong to its text'
        USING ERRCODE = 'integrity_constraint_violation';
    END IF;
    IF (said ->> 'id')::uuid IS DISTINCT FROM NEW.id
      OR (said ->> 'teamId')::uuid IS DISTINCT FROM NEW.team_id
      OR (said ->> 'sequence')::integer IS DISTINCT FROM NEW.sequence
      OR (said ->> 'at')::timestamptz IS DISTINCT FROM NEW.at
      OR (said ->> 'actorId')::uuid IS DISTINCT FROM NEW.actor_id
      OR (said ->> 'projectId')::uuid IS DISTINCT FROM NEW.project_id
      OR said ->> 'action' IS DISTINCT FROM NEW.action
    THEN
      RAISE EXCEPTION 'the columns of an audit entry differ from its text'
        USING ERRCODE = 'integrity_constraint_violation';
    END IF;
    UPDATE audit_heads SET sequence = NEW.sequence, hash = NEW.hash WHERE team_id = NEW.team_id;
    RETURN NEW;
  END $$;
  CREATE TRIGGER check_audit_entry BEFORE INSERT ON audit_entries
    FOR EACH ROW EXECUTE FUNCTION check_audit_entry();
  CREATE TRIGGER keep_audit_entries BEFORE UPDATE OR DELETE ON audit_entries
    FOR EACH ROW EXECUTE FUNCTION forbid_change();
  CREATE TRIGGER keep_all_audit_entries BEFORE TRUNCATE ON audit_entries
    FOR EACH STATEMENT EXECUTE FUNCTION forbid_change();

  GRANT SELECT, INSERT ON audit_entries TO ringstead_app;
`;

const DOWN = `
  DROP TABLE audit_entries;
  DROP FUNCTION check_audit_entry();
`;

interface Step {
  readonly context: QueryInterface;
}

export async function up({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(UP, { transaction }));
}

export async function down({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(DOWN, { transaction }));
}

import type { QueryInterface } from 'sequelize';

/**
 * The last link of each team's audit chain. Only the function below and the check of new entries touch it, as
 * the owner of the tables; the run-time role may read it.
 */
const UP = `
  CREATE TABLE audit_heads (
    team_id uuid PRIMARY KEY REFERENCES teams,
    sequence integer NOT NULL DEFAULT 0 CHECK (sequence >= 0),
    hash text NOT NULL DEFAULT repeat('0', 64) CHECK (hash ~ '^[0-9a-f]{64}$')
  );

  CREATE FUNCTION guard_audit_head() RETURNS trigger
    LANGUAGE plpgsql SET search_path = public, pg_temp AS $$
  BEGIN
    IF NEW.team_id <> OLD.team_id OR NEW.sequence <> OLD.sequence + 1 THEN
      RAISE EXCEPTION 'the head of an audit chain only moves on by one entry'
        USING ERRCODE = 'integrity_constraint_violation';
    END IF;
    RETURN NEW;
  END $$;
  CREATE TRIGGER guard_audit_head BEFORE UPDATE ON audit_heads
    FOR EACH ROW EXECUTE FUNCTION guard_audit_head();
  CREATE TRIGGER keep_audit_heads BEFORE DELETE ON audit_heads
    FOR EACH ROW EXECUTE FUNCTION forbid_change();
  CREATE TRIGGER keep_all_audit_heads BEFORE TRUNCATE ON audit_heads
    FOR EACH STATEMENT EXECUTE FUNCTION forbid_change();

  CREATE FUNCTION lock_audit_head(team uuid) RETURNS TABLE (sequence integer, hash text)
    LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
  BEGIN
    INSERT INTO audit_heads (team_id) VALUES (team) ON CONFLICT DO NOTHING;
    RETURN QUERY
      SELECT head.sequence, head.hash FROM audit_heads head WHERE head.team_id = team FOR UPDATE;
  END $$;
  REVOKE ALL ON FUNCTION lock_audit_head(uuid) FROM PUBLIC;

  GRANT SELECT ON audit_heads TO ringstead_app;
  GRANT EXECUTE ON FUNCTION lock_audit_head(uuid) TO ringstead_app;
`;

const DOWN = `
  DROP FUNCTION lock_audit_head(uuid);
  DROP TABLE audit_heads;
  DROP FUNCTION guard_audit_head();
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

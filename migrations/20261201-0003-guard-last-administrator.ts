import type { QueryInterface } from 'sequelize';

/**
 * A team keeps at least one active administrator, whatever races. The team's row is locked first, so that of
 * two administrators who remove each other the second one sees what the first did.
 */
const UP = `
  CREATE FUNCTION guard_last_administrator() RETURNS trigger
    LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
  BEGIN
    PERFORM FROM teams WHERE id = OLD.team_id FOR NO KEY UPDATE;
    IF NOT EXISTS (
      SELECT FROM people
      WHERE team_id = OLD.team_id AND id <> OLD.id AND is_administrator AND active
    ) THEN
      RAISE EXCEPTION 'the last active administrator of a team stays'
        USING ERRCODE = 'check_violation', CONSTRAINT = 'people_last_administrator';
    END IF;
    RETURN NEW;
  END $$;

  CREATE TRIGGER guard_last_administrator BEFORE UPDATE ON people
    FOR EACH ROW
    WHEN (OLD.is_administrator AND OLD.active AND NOT (NEW.is_administrator AND NEW.active))
    EXECUTE FUNCTION guard_last_administrator();
`;

const DOWN = `
  DROP TRIGGER guard_last_administrator ON people;
  DROP FUNCTION guard_last_administrator();
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

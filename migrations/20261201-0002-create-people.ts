import type { QueryInterface } from 'sequelize';

/** An account never changes its team or address and is never deleted: others' records name it. */
const UP = `
  CREATE TABLE people (
    id uuid PRIMARY KEY,
    team_id uuid NOT NULL REFERENCES teams,
    name text NOT NULL CHECK (length(name) BETWEEN 1 AND 120),
    email text NOT NULL CONSTRAINT people_email_key UNIQUE CHECK (email = lower(email)),
    password_hash text NOT NULL CHECK (password_hash LIKE '$argon2id$%'),
    role text NOT NULL
      CHECK (role IN ('guest', 'technician', 'designer', 'reviewer', 'lead')),
    is_administrator boolean NOT NULL DEFAULT false,
    active boolean NOT NULL DEFAULT true,
    units text NOT NULL DEFAULT 'mm-kg-N'
      CHECK (units IN ('m-kg-N', 'mm-kg-N', 'in-lbm-lbf')),
    theme text NOT NULL DEFAULT 'system' CHECK (theme IN ('paper', 'chalk', 'system')),
    session_epoch integer NOT NULL DEFAULT 0,
    last_sign_in_at timestamptz,
    created_at timestamptz NOT NULL DEFAULT now(),
    updated_at timestamptz NOT NULL DEFAULT now(),
    UNIQUE (team_id, id)
  );
  GRANT SELECT, INSERT ON people TO ringstead_app;
  GRANT UPDATE (name, password_hash, role, is_administrator, active, units, theme, session_epoch,
    last_sign_in_at, updated_at) ON people TO ringstead_app;
`;

const DOWN = `DROP TABLE people`;

interface Step {
  readonly context: QueryInterface;
}

export async function up({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(UP, { transaction }));
}

export async function down({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(DOWN, { transaction }));
}

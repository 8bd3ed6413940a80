import type { QueryInterface } from 'sequelize';

/** A reset link works once and for a short time; its token is kept as a hash only. */
const UP = `
  CREATE TABLE password_resets (
    id uuid PRIMARY KEY,
    person_id uuid NOT NULL REFERENCES people,
    token_hash text NOT NULL UNIQUE CHECK (token_hash ~ '^[0-9a-f]{64}$'),
    expires_at timestamptz NOT NULL,
    used_at timestamptz,
    created_at timestamptz NOT NULL DEFAULT now()
  );
  CREATE INDEX password_resets_person ON password_resets (person_id);
  GRANT SELECT, INSERT, DELETE ON password_resets TO ringstead_app;
  GRANT UPDATE (used_at) ON password_resets TO ringstead_app;
`;

const DOWN = `DROP TABLE password_resets`;

interface Step {
  readonly context: QueryInterface;
}

export async function up({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(UP, { transaction }));
}

export async function down({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(DOWN, { transaction }));
}

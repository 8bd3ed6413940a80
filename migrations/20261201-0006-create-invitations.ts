import type { QueryInterface } from 'sequelize';

/** One open invitation per address and team; its token is kept as a hash only. */
const UP = `
  CREATE TABLE invitations (
    id uuid PRIMARY KEY,
    team_id uuid NOT NULL REFERENCES teams,
    email text NOT NULL CHECK (email = lower(email)),
    role text NOT NULL
      CHECK (role IN ('guest', 'technician', 'designer', 'reviewer', 'lead')),
    is_administrator boolean NOT NULL,
    invited_by_id uuid NOT NULL REFERENCES people,
    token_hash text UNIQUE CHECK (token_hash ~ '^[0-9a-f]{64}$'),
    expires_at timestamptz NOT NULL,
    accepted_at timestamptz,
    created_at timestamptz NOT NULL DEFAULT now(),
    updated_at timestamptz NOT NULL DEFAULT now()
  );
  CREATE UNIQUE INDEX invitations_open_key ON invitations (team_id, email)
    WHERE accepted_at IS NULL;
  GRANT SELECT, INSERT, DELETE ON invitations TO ringstead_app;
  GRANT UPDATE (role, is_administrator, invited_by_id, token_hash, expires_at, accepted_at,
    updated_at) ON invitations TO ringstead_app;
`;

const DOWN = `DROP TABLE invitations`;

interface Step {
  readonly context: QueryInterface;
}

export async function up({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(UP, { transaction }));
}

export async function down({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(DOWN, { transaction }));
}

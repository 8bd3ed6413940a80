import type { QueryInterface } from 'sequelize';

/** People work in one team each; nothing crosses from one team to another. */
const UP = `
  CREATE TABLE teams (
    id uuid PRIMARY KEY,
    name text NOT NULL CHECK (length(name) BETWEEN 1 AND 120),
    sole_reviewer_may_approve boolean NOT NULL DEFAULT false,
    required_reviews smallint NOT NULL DEFAULT 1 CHECK (required_reviews BETWEEN 1 AND 5),
    created_at timestamptz NOT NULL DEFAULT now(),
    updated_at timestamptz NOT NULL DEFAULT now()
  );
  GRANT SELECT, INSERT ON teams TO ringstead_app;
  GRANT UPDATE (name, sole_reviewer_may_approve, required_reviews, updated_at)
    ON teams TO ringstead_app;
`;

const DOWN = `DROP TABLE teams`;

interface Step {
  readonly context: QueryInterface;
}

export async function up({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(UP, { transaction }));
}

export async function down({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(DOWN, { transaction }));
}

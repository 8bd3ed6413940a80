import type { QueryInterface } from 'sequelize';

interface Migration {
  readonly context: QueryInterface;
}

/** One machine frame each. The pair (team_id, id) lets other tables tie a row to project and team at once. */
export async function up({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `CREATE TABLE projects (
        id uuid PRIMARY KEY,
        team_id uuid NOT NULL REFERENCES teams (id),
        name text NOT NULL CHECK (length(name) BETWEEN 1 AND 120),
        machine text NOT NULL CHECK (length(machine) <= 120),
        created_by_id uuid NOT NULL REFERENCES people (id),
        created_at timestamptz NOT NULL DEFAULT now(),
        updated_at timestamptz NOT NULL DEFAULT now(),
        UNIQUE (team_id, id)
      );
      CREATE INDEX projects_newest ON projects (team_id, updated_at DESC);
      GRANT SELECT, INSERT, UPDATE (name, machine, updated_at) ON projects TO ringstead_app;`,
      { transaction },
    );
  });
}

export async function down({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(`DROP TABLE projects`, { transaction });
  });
}

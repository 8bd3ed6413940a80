import type { QueryInterface } from 'sequelize';

interface Migration {
  readonly context: QueryInterface;
}

/** Whom a project is shared with. Rows come and go; the audit trail keeps who shared what with whom. */
export async function up({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `CREATE TABLE project_members (
        project_id uuid NOT NULL REFERENCES projects (id),
        person_id uuid NOT NULL REFERENCES people (id),
        added_by_id uuid NOT NULL REFERENCES people (id),
        added_at timestamptz NOT NULL DEFAULT now(),
        PRIMARY KEY (project_id, person_id)
      );
      CREATE INDEX project_members_of_person ON project_members (person_id);
      GRANT SELECT, INSERT, DELETE ON project_members TO ringstead_app;`,
      { transaction },
    );
  });
}

export async function down({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(`DROP TABLE project_members`, { transaction });
  });
}

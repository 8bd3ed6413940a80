import type { QueryInterface } from 'sequelize';

interface Migration {
  readonly context: QueryInterface;
}

/** What people say about a revision; a comment once made stands. */
export async function up({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `CREATE TABLE revision_comments (
        id uuid PRIMARY KEY,
        revision_id uuid NOT NULL REFERENCES revisions (id),
        author_id uuid NOT NULL REFERENCES people (id),
        body text NOT NULL CHECK (length(body) BETWEEN 1 AND 4000),
        created_at timestamptz NOT NULL DEFAULT now()
      );
      CREATE INDEX revision_comments_in_order ON revision_comments (revision_id, created_at);
      CREATE TRIGGER revision_comments_kept BEFORE UPDATE OR DELETE OR TRUNCATE ON revision_comments
        FOR EACH STATEMENT EXECUTE FUNCTION forbid_change();
      GRANT SELECT, INSERT ON revision_comments TO ringstead_app;`,
      { transaction },
    );
  });
}

export async function down({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(`DROP TABLE revision_comments`, { transaction });
  });
}

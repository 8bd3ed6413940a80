import type { QueryInterface } from 'sequelize';

interface Migration {
  readonly context: QueryInterface;
}

/** Who changed the draft since the previous approved revision; written in the transaction that submits, never after. */
export async function up({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `CREATE TABLE revision_authors (
        revision_id uuid NOT NULL REFERENCES revisions (id),
        person_id uuid NOT NULL REFERENCES people (id),
        PRIMARY KEY (revision_id, person_id)
      );
      CREATE TRIGGER revision_authors_kept BEFORE UPDATE OR DELETE OR TRUNCATE ON revision_authors
        FOR EACH STATEMENT EXECUTE FUNCTION forbid_change();
      GRANT SELECT, INSERT ON revision_authors TO ringstead_app;

      CREATE FUNCTION check_frozen_at_submission() RETURNS trigger LANGUAGE plpgsql
      SET search_path = public, pg_temp AS $$
      BEGIN
        IF NOT EXISTS (
          SELECT FROM revisions r
           WHERE r.id = NEW.revision_id AND r.submission_transaction = pg_current_xact_id()
        ) THEN
          RAISE EXCEPTION 'Nothing is added to what a revision froze when it was submitted.'
            USING ERRCODE = 'restrict_violation';
        END IF;
        RETURN NEW;
      END $$;
      CREATE TRIGGER revision_authors_frozen BEFORE INSERT ON revision_authors
        FOR EACH ROW EXECUTE FUNCTION check_frozen_at_submission();`,
      { transaction },
    );
  });
}

export async function down({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `DROP TABLE revision_authors; DROP FUNCTION check_frozen_at_submission()`,
      { transaction },
    );
  });
}

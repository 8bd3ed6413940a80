import type { QueryInterface } from 'sequelize';

interface Migration {
  readonly context: QueryInterface;
}

/** The solves frozen with a revision, each tied to its unchangeable result. */
export async function up({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `CREATE TABLE revision_solves (
        revision_id uuid NOT NULL,
        team_id uuid NOT NULL,
        solve_id uuid NOT NULL REFERENCES solves (id),
        result_key sha256_hex NOT NULL,
        PRIMARY KEY (revision_id, result_key),
        FOREIGN KEY (team_id, revision_id) REFERENCES revisions (team_id, id),
        FOREIGN KEY (team_id, result_key) REFERENCES solve_results (team_id, key)
      );
      CREATE TRIGGER revision_solves_kept BEFORE UPDATE OR DELETE OR TRUNCATE ON revision_solves
        FOR EACH STATEMENT EXECUTE FUNCTION forbid_change();
      GRANT SELECT, INSERT ON revision_solves TO ringstead_app;
      CREATE TRIGGER revision_solves_frozen BEFORE INSERT ON revision_solves
        FOR EACH ROW EXECUTE FUNCTION check_frozen_at_submission();

      CREATE FUNCTION check_frozen_solve() RETURNS trigger LANGUAGE plpgsql
      SET search_path = public, pg_temp AS $$
      BEGIN
        IF NOT EXISTS (
          SELECT FROM revisions r
            JOIN solve_results s ON s.team_id = NEW.team_id AND s.key = NEW.result_key
            JOIN solves ON solves.id = NEW.solve_id AND solves.stored_key = NEW.result_key
           WHERE r.id = NEW.revision_id AND solves.project_id = r.project_id
             AND s.document_fingerprint = r.document_fingerprint AND s.settings = r.settings
             AND s.solver_version = r.solver_version AND s.complete
        ) THEN
          RAISE EXCEPTION 'A revision carries complete results of its own document and settings only.'
            USING ERRCODE = 'check_violation';
        END IF;
        RETURN NEW;
      END $$;
      CREATE TRIGGER revision_solves_match BEFORE INSERT ON revision_solves
        FOR EACH ROW EXECUTE FUNCTION check_frozen_solve();`,
      { transaction },
    );
  });
}

export async function down({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `DROP TABLE revision_solves; DROP FUNCTION check_frozen_solve()`,
      { transaction },
    );
  });
}

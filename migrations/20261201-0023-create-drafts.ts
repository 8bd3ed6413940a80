import type { QueryInterface } from 'sequelize';

interface Migration {
  readonly context: QueryInterface;
}

/**
 * The one editable state of a frame, and every version it went through: who wrote a version makes its writer an
 * author of the next revision, so versions are never changed or deleted.
 */
export async function up({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `CREATE TABLE drafts (
        project_id uuid PRIMARY KEY,
        team_id uuid NOT NULL,
        version integer NOT NULL CHECK (version >= 1),
        fingerprint sha256_hex NOT NULL,
        updated_by_id uuid NOT NULL REFERENCES people (id),
        updated_at timestamptz NOT NULL DEFAULT now(),
        FOREIGN KEY (team_id, project_id) REFERENCES projects (team_id, id),
        FOREIGN KEY (team_id, fingerprint) REFERENCES frame_documents (team_id, fingerprint)
      );
      GRANT SELECT, INSERT, UPDATE (version, fingerprint, updated_by_id, updated_at) ON drafts
        TO ringstead_app;

      CREATE TABLE draft_versions (
        project_id uuid NOT NULL REFERENCES drafts (project_id),
        version integer NOT NULL CHECK (version >= 1),
        team_id uuid NOT NULL,
        fingerprint sha256_hex NOT NULL,
        written_by_id uuid NOT NULL REFERENCES people (id),
        written_at timestamptz NOT NULL DEFAULT now(),
        PRIMARY KEY (project_id, version),
        FOREIGN KEY (team_id, fingerprint) REFERENCES frame_documents (team_id, fingerprint)
      );
      CREATE TRIGGER draft_versions_kept BEFORE UPDATE OR DELETE OR TRUNCATE ON draft_versions
        FOR EACH STATEMENT EXECUTE FUNCTION forbid_change();
      GRANT SELECT, INSERT ON draft_versions TO ringstead_app;

      CREATE FUNCTION check_draft_step() RETURNS trigger LANGUAGE plpgsql
      SET search_path = public, pg_temp AS $$
      BEGIN
        IF NEW.version <> OLD.version + 1 THEN
          RAISE EXCEPTION 'A draft goes forward one version at a time.' USING ERRCODE = 'check_violation';
        END IF;
        RETURN NEW;
      END $$;
      CREATE TRIGGER drafts_step BEFORE UPDATE ON drafts
        FOR EACH ROW EXECUTE FUNCTION check_draft_step();

      CREATE FUNCTION check_draft_recorded() RETURNS trigger LANGUAGE plpgsql
      SET search_path = public, pg_temp AS $$
      BEGIN
        IF NOT EXISTS (
          SELECT FROM draft_versions v
           WHERE v.project_id = NEW.project_id AND v.version = NEW.version
             AND v.fingerprint = NEW.fingerprint AND v.written_by_id = NEW.updated_by_id
        ) THEN
          RAISE EXCEPTION 'Version % of a draft has no record of who wrote it.', NEW.version
            USING ERRCODE = 'check_violation';
        END IF;
        RETURN NULL;
      END $$;
      CREATE CONSTRAINT TRIGGER drafts_recorded AFTER INSERT OR UPDATE ON drafts
        DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION check_draft_recorded();`,
      { transaction },
    );
  });
}

export async function down({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `DROP TABLE draft_versions; DROP TABLE drafts; DROP FUNCTION check_draft_step(); DROP FUNCTION check_draft_recorded()`,
      { transaction },
    );
  });
}

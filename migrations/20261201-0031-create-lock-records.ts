import type { QueryInterface } from 'sequelize';

interface Migration {
  readonly context: QueryInterface;
}

/**
 * What a locked revision carries: canonical JSON under its own SHA-256. It is written in the transaction that
 * approves, about the very document approved; an approved revision without one cannot be committed, nor a
 * superseded one without a later approval.
 */
export async function up({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `CREATE TABLE lock_records (
        revision_id uuid PRIMARY KEY REFERENCES revisions (id),
        fingerprint sha256_hex NOT NULL,
        content text NOT NULL,
        created_at timestamptz NOT NULL DEFAULT now(),
        CHECK (fingerprint = encode(sha256(convert_to(content, 'UTF8')), 'hex'))
      );
      CREATE TRIGGER lock_records_kept BEFORE UPDATE OR DELETE OR TRUNCATE ON lock_records
        FOR EACH STATEMENT EXECUTE FUNCTION forbid_change();
      GRANT SELECT, INSERT ON lock_records TO ringstead_app;

      CREATE FUNCTION check_lock_record() RETURNS trigger LANGUAGE plpgsql
      SET search_path = public, pg_temp AS $$
      BEGIN
        IF NOT EXISTS (
          SELECT FROM revisions r
           WHERE r.id = NEW.revision_id AND r.approval_transaction = pg_current_xact_id()
             AND r.document_fingerprint = NEW.content::jsonb ->> 'documentFingerprint'
             AND r.project_id::text = NEW.content::jsonb ->> 'project'
             AND r.number::text = NEW.content::jsonb ->> 'revision'
        ) THEN
          RAISE EXCEPTION 'A lock record is made while its revision is approved, about that revision.'
            USING ERRCODE = 'restrict_violation';
        END IF;
        RETURN NEW;
      END $$;
      CREATE TRIGGER lock_records_with_approval BEFORE INSERT ON lock_records
        FOR EACH ROW EXECUTE FUNCTION check_lock_record();

      CREATE FUNCTION check_revision_end() RETURNS trigger LANGUAGE plpgsql
      SET search_path = public, pg_temp AS $$
      BEGIN
        IF NEW.state = 'approved' AND NOT EXISTS (
          SELECT FROM lock_records WHERE revision_id = NEW.id
        ) THEN
          RAISE EXCEPTION 'An approved revision needs its lock record.' USING ERRCODE = 'check_violation';
        END IF;
        IF NEW.state = 'superseded' AND NOT EXISTS (
          SELECT FROM revisions r
           WHERE r.project_id = NEW.project_id AND r.number > NEW.number AND r.approved_at IS NOT NULL
        ) THEN
          RAISE EXCEPTION 'Only a later approved revision supersedes.' USING ERRCODE = 'check_violation';
        END IF;
        RETURN NULL;
      END $$;
      CREATE CONSTRAINT TRIGGER revisions_end AFTER UPDATE ON revisions
        DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION check_revision_end();`,
      { transaction },
    );
  });
}

export async function down({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `DROP TRIGGER revisions_end ON revisions; DROP FUNCTION check_revision_end(); DROP TABLE lock_records; DROP FUNCTION check_lock_record()`,
      { transaction },
    );
  });
}

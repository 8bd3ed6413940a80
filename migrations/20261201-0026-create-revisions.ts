import type { QueryInterface } from 'sequelize';

interface Migration {
  readonly context: QueryInterface;
}

/**
 * Frozen, numbered copies of a draft. Everything but the state and what goes with it is written once; the state
 * moves only as the transition table allows, and a revision is never deleted.
 */
export async function up({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `CREATE TABLE revisions (
        id uuid PRIMARY KEY,
        team_id uuid NOT NULL,
        project_id uuid NOT NULL,
        number integer NOT NULL CHECK (number >= 1),
        state text NOT NULL CHECK (state IN
          ('submitted', 'recalled', 'returned', 'accepted', 'approved', 'superseded', 'withdrawn')),
        state_since timestamptz NOT NULL DEFAULT now(),
        change_note text NOT NULL CHECK (length(change_note) BETWEEN 1 AND 4000),
        draft_version integer NOT NULL,
        document_fingerprint sha256_hex NOT NULL,
        settings jsonb NOT NULL,
        solver_version text NOT NULL,
        required_reviews integer NOT NULL CHECK (required_reviews BETWEEN 1 AND 5),
        sole_reviewer_may_approve boolean NOT NULL,
        submitted_by_id uuid NOT NULL REFERENCES people (id),
        submitted_at timestamptz NOT NULL DEFAULT now(),
        submission_transaction xid8 NOT NULL,
        approved_by_id uuid REFERENCES people (id),
        approved_at timestamptz,
        approval_transaction xid8,
        withdrawn_by_id uuid REFERENCES people (id),
        withdrawn_at timestamptz,
        withdrawal_reason text CHECK (length(withdrawal_reason) BETWEEN 1 AND 4000),
        UNIQUE (project_id, number),
        UNIQUE (team_id, id),
        FOREIGN KEY (team_id, project_id) REFERENCES projects (team_id, id),
        FOREIGN KEY (team_id, document_fingerprint) REFERENCES frame_documents (team_id, fingerprint),
        FOREIGN KEY (project_id, draft_version) REFERENCES draft_versions (project_id, version),
        CHECK ((state IN ('approved', 'superseded', 'withdrawn')) = (approved_by_id IS NOT NULL)),
        CHECK ((approved_by_id IS NULL) = (approved_at IS NULL)),
        CHECK ((state = 'withdrawn') = (withdrawn_by_id IS NOT NULL)),
        CHECK ((withdrawn_by_id IS NULL) = (withdrawn_at IS NULL)),
        CHECK ((withdrawn_by_id IS NULL) = (withdrawal_reason IS NULL))
      );
      CREATE UNIQUE INDEX revisions_one_under_way ON revisions (project_id)
        WHERE state IN ('submitted', 'accepted');
      CREATE UNIQUE INDEX revisions_one_approved ON revisions (project_id) WHERE state = 'approved';
      GRANT SELECT, INSERT,
        UPDATE (state, state_since, approved_by_id, approved_at, withdrawn_by_id, withdrawn_at, withdrawal_reason)
        ON revisions TO ringstead_app;

      ALTER TABLE solves ADD FOREIGN KEY (team_id, revision_id) REFERENCES revisions (team_id, id);

      CREATE FUNCTION check_revision_start() RETURNS trigger LANGUAGE plpgsql
      SET search_path = public, pg_temp AS $$
      BEGIN
        IF NEW.state <> 'submitted' THEN
          RAISE EXCEPTION 'A revision begins as submitted.' USING ERRCODE = 'check_violation';
        END IF;
        IF NOT EXISTS (
          SELECT FROM draft_versions v
           WHERE v.project_id = NEW.project_id AND v.version = NEW.draft_version
             AND v.fingerprint = NEW.document_fingerprint
        ) THEN
          RAISE EXCEPTION 'A revision freezes the document of the draft version it names.'
            USING ERRCODE = 'check_violation';
        END IF;
        NEW.submission_transaction := pg_current_xact_id();
        RETURN NEW;
      END $$;
      CREATE TRIGGER revisions_start BEFORE INSERT ON revisions
        FOR EACH ROW EXECUTE FUNCTION check_revision_start();

      CREATE FUNCTION check_revision_step() RETURNS trigger LANGUAGE plpgsql
      SET search_path = public, pg_temp AS $$
      DECLARE
        frozen_before jsonb := to_jsonb(OLD)
          - ARRAY['state', 'state_since', 'approved_by_id', 'approved_at', 'approval_transaction',
                  'withdrawn_by_id', 'withdrawn_at', 'withdrawal_reason'];
        frozen_after jsonb := to_jsonb(NEW)
          - ARRAY['state', 'state_since', 'approved_by_id', 'approved_at', 'approval_transaction',
                  'withdrawn_by_id', 'withdrawn_at', 'withdrawal_reason'];
      BEGIN
        IF frozen_before <> frozen_after THEN
          RAISE EXCEPTION 'What a revision froze is never changed.' USING ERRCODE = 'restrict_violation';
        END IF;
        IF NOT EXISTS (
          SELECT FROM (VALUES
            ('submitted', 'recalled'), ('submitted', 'returned'), ('submitted', 'accepted'),
            ('accepted', 'returned'), ('accepted', 'approved'),
            ('approved', 'superseded'), ('approved', 'withdrawn')
          ) AS step (before, after) WHERE step.before = OLD.state AND step.after = NEW.state
        ) THEN
          RAISE EXCEPTION 'A revision cannot go from % to %.', OLD.state, NEW.state
            USING ERRCODE = 'restrict_violation';
        END IF;
        IF NEW.state = 'approved' THEN
          NEW.approval_transaction := pg_current_xact_id();
        ELSIF (NEW.approved_by_id, NEW.approved_at, NEW.approval_transaction)
           IS DISTINCT FROM (OLD.approved_by_id, OLD.approved_at, OLD.approval_transaction) THEN
          RAISE EXCEPTION 'Who approved a revision is never changed.' USING ERRCODE = 'restrict_violation';
        END IF;
        RETURN NEW;
      END $$;
      CREATE TRIGGER revisions_step BEFORE UPDATE ON revisions
        FOR EACH ROW EXECUTE FUNCTION check_revision_step();
      CREATE TRIGGER revisions_kept BEFORE DELETE OR TRUNCATE ON revisions
        FOR EACH STATEMENT EXECUTE FUNCTION forbid_change();`,
      { transaction },
    );
  });
}

export async function down({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `ALTER TABLE solves DROP CONSTRAINT solves_team_id_revision_id_fkey; DROP TABLE revisions; DROP FUNCTION check_revision_start(); DROP FUNCTION check_revision_step()`,
      { transaction },
    );
  });
}

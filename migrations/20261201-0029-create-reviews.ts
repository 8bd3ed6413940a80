import type { QueryInterface } from 'sequelize';

interface Migration {
  readonly context: QueryInterface;
}

/**
 * Verdicts on a revision. A reviewer accepts once, a revision is returned once, and an author never reviews.
 * A revision becomes accepted only with the reviews it requires.
 */
export async function up({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `CREATE TABLE reviews (
        id uuid PRIMARY KEY,
        revision_id uuid NOT NULL REFERENCES revisions (id),
        reviewer_id uuid NOT NULL REFERENCES people (id),
        verdict text NOT NULL CHECK (verdict IN ('accept', 'return')),
        comment text NOT NULL CHECK (length(comment) <= 4000),
        created_at timestamptz NOT NULL DEFAULT now(),
        CHECK (verdict = 'accept' OR length(comment) > 0)
      );
      CREATE UNIQUE INDEX reviews_accept_once ON reviews (revision_id, reviewer_id)
        WHERE verdict = 'accept';
      CREATE UNIQUE INDEX reviews_return_once ON reviews (revision_id) WHERE verdict = 'return';
      CREATE TRIGGER reviews_kept BEFORE UPDATE OR DELETE OR TRUNCATE ON reviews
        FOR EACH STATEMENT EXECUTE FUNCTION forbid_change();
      GRANT SELECT, INSERT ON reviews TO ringstead_app;

      CREATE FUNCTION check_review() RETURNS trigger LANGUAGE plpgsql
      SET search_path = public, pg_temp AS $$
      BEGIN
        IF NOT EXISTS (
          SELECT FROM revisions r WHERE r.id = NEW.revision_id
             AND (r.state = 'submitted' OR (r.state = 'accepted' AND NEW.verdict = 'return'))
        ) THEN
          RAISE EXCEPTION 'This revision is not under review.' USING ERRCODE = 'restrict_violation';
        END IF;
        IF EXISTS (
          SELECT FROM revision_authors a
           WHERE a.revision_id = NEW.revision_id AND a.person_id = NEW.reviewer_id
        ) THEN
          RAISE EXCEPTION 'An author does not review.' USING ERRCODE = 'restrict_violation';
        END IF;
        RETURN NEW;
      END $$;
      CREATE TRIGGER reviews_allowed BEFORE INSERT ON reviews
        FOR EACH ROW EXECUTE FUNCTION check_review();

      CREATE FUNCTION check_revision_reviewed() RETURNS trigger LANGUAGE plpgsql
      SET search_path = public, pg_temp AS $$
      BEGIN
        IF NEW.state IN ('accepted', 'approved') AND NEW.required_reviews > (
          SELECT count(*) FROM reviews WHERE revision_id = NEW.id AND verdict = 'accept'
        ) THEN
          RAISE EXCEPTION 'This revision does not have its required reviews.'
            USING ERRCODE = 'restrict_violation';
        END IF;
        IF NEW.state = 'returned' AND NOT EXISTS (
          SELECT FROM reviews WHERE revision_id = NEW.id AND verdict = 'return'
        ) THEN
          RAISE EXCEPTION 'A revision is returned by a review.' USING ERRCODE = 'restrict_violation';
        END IF;
        IF NEW.state = 'approved' AND EXISTS (
          SELECT FROM revision_authors WHERE revision_id = NEW.id AND person_id = NEW.approved_by_id
        ) THEN
          RAISE EXCEPTION 'An author does not approve.' USING ERRCODE = 'restrict_violation';
        END IF;
        IF NEW.state = 'approved' AND NOT NEW.sole_reviewer_may_approve AND NOT EXISTS (
          SELECT FROM reviews
           WHERE revision_id = NEW.id AND verdict = 'accept' AND reviewer_id <> NEW.approved_by_id
        ) THEN
          RAISE EXCEPTION 'The only reviewer does not approve in this team.'
            USING ERRCODE = 'restrict_violation';
        END IF;
        RETURN NEW;
      END $$;
      CREATE TRIGGER revisions_reviewed BEFORE UPDATE ON revisions
        FOR EACH ROW EXECUTE FUNCTION check_revision_reviewed();`,
      { transaction },
    );
  });
}

export async function down({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `DROP TRIGGER revisions_reviewed ON revisions; DROP FUNCTION check_revision_reviewed(); DROP TABLE reviews; DROP FUNCTION check_review()`,
      { transaction },
    );
  });
}

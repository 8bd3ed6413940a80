import type { QueryInterface } from 'sequelize';

interface Migration {
  readonly context: QueryInterface;
}

/**
 * Solves asked for in a project: queue, progress and outcome. A solve is done only when its result is stored, at most
 * one per project and result key is under way, and one that has ended never changes.
 */
export async function up({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `CREATE TABLE solves (
        id uuid PRIMARY KEY,
        team_id uuid NOT NULL,
        project_id uuid NOT NULL,
        revision_id uuid,
        document_fingerprint sha256_hex NOT NULL,
        state_id text,
        method text NOT NULL CHECK (method IN ('consistent', 'lumped', 'mesh-free')),
        settings jsonb NOT NULL,
        solver_version text NOT NULL,
        result_key sha256_hex NOT NULL,
        status text NOT NULL CHECK (status IN ('queued', 'running', 'done', 'failed', 'cancelled')),
        progress double precision NOT NULL DEFAULT 0 CHECK (progress BETWEEN 0 AND 1),
        stage text NOT NULL DEFAULT '',
        error jsonb,
        requested_by_id uuid NOT NULL REFERENCES people (id),
        requested_at timestamptz NOT NULL DEFAULT now(),
        queued_at timestamptz NOT NULL DEFAULT now(),
        started_at timestamptz,
        finished_at timestamptz,
        elapsed_ms double precision,
        runner_id uuid,
        attempt integer NOT NULL DEFAULT 0,
        heartbeat_at timestamptz,
        stored_key text GENERATED ALWAYS AS (CASE WHEN status = 'done' THEN result_key::text END) STORED,
        FOREIGN KEY (team_id, project_id) REFERENCES projects (team_id, id),
        FOREIGN KEY (team_id, document_fingerprint) REFERENCES frame_documents (team_id, fingerprint),
        FOREIGN KEY (team_id, stored_key) REFERENCES solve_results (team_id, key),
        CHECK ((status = 'failed') = (error IS NOT NULL)),
        CHECK ((status IN ('done', 'failed', 'cancelled')) = (finished_at IS NOT NULL)),
        CHECK (status <> 'running' OR (runner_id IS NOT NULL AND heartbeat_at IS NOT NULL))
      );
      CREATE UNIQUE INDEX solves_under_way_once ON solves (project_id, result_key)
        WHERE status IN ('queued', 'running');
      CREATE INDEX solves_under_way ON solves (status) WHERE status IN ('queued', 'running');
      CREATE INDEX solves_newest ON solves (project_id, requested_at DESC);
      GRANT SELECT, INSERT,
        UPDATE (status, progress, stage, error, queued_at, started_at, finished_at, elapsed_ms,
                runner_id, attempt, heartbeat_at)
        ON solves TO ringstead_app;

      CREATE FUNCTION check_solve_step() RETURNS trigger LANGUAGE plpgsql
      SET search_path = public, pg_temp AS $$
      BEGIN
        IF OLD.status IN ('done', 'failed', 'cancelled') THEN
          RAISE EXCEPTION 'Solve % has ended and is never changed.', OLD.id
            USING ERRCODE = 'restrict_violation';
        END IF;
        IF NEW.attempt < OLD.attempt THEN
          RAISE EXCEPTION 'The attempts of solve % only count up.', OLD.id
            USING ERRCODE = 'check_violation';
        END IF;
        RETURN NEW;
      END $$;
      CREATE TRIGGER solves_step BEFORE UPDATE ON solves
        FOR EACH ROW EXECUTE FUNCTION check_solve_step();`,
      { transaction },
    );
  });
}

export async function down({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(`DROP TABLE solves; DROP FUNCTION check_solve_step()`, {
      transaction,
    });
  });
}

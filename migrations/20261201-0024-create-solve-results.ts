import type { QueryInterface } from 'sequelize';

interface Migration {
  readonly context: QueryInterface;
}

/**
 * What a solver returned, once per team, document, state, method, settings and solver version (together the key).
 * The summary is canonical JSON without its timing, so that the database can check both fingerprints.
 */
export async function up({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `CREATE TABLE solve_results (
        team_id uuid NOT NULL,
        key sha256_hex NOT NULL,
        document_fingerprint sha256_hex NOT NULL,
        state_id text,
        method text NOT NULL CHECK (method IN ('consistent', 'lumped', 'mesh-free')),
        settings jsonb NOT NULL,
        solver_version text NOT NULL,
        complete boolean NOT NULL,
        first_frequency_hz double precision,
        summary text NOT NULL,
        summary_fingerprint sha256_hex NOT NULL,
        timing jsonb NOT NULL,
        shapes bytea NOT NULL,
        shapes_fingerprint sha256_hex NOT NULL,
        created_at timestamptz NOT NULL DEFAULT now(),
        PRIMARY KEY (team_id, key),
        FOREIGN KEY (team_id, document_fingerprint) REFERENCES frame_documents (team_id, fingerprint),
        CHECK (summary_fingerprint = encode(sha256(convert_to(summary, 'UTF8')), 'hex')),
        CHECK (shapes_fingerprint = encode(sha256(shapes), 'hex'))
      );
      CREATE INDEX solve_results_of_document ON solve_results (team_id, document_fingerprint);
      CREATE TRIGGER solve_results_kept BEFORE UPDATE OR DELETE OR TRUNCATE ON solve_results
        FOR EACH STATEMENT EXECUTE FUNCTION forbid_change();
      GRANT SELECT, INSERT ON solve_results TO ringstead_app;`,
      { transaction },
    );
  });
}

export async function down({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(`DROP TABLE solve_results`, { transaction });
  });
}

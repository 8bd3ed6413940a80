import type { QueryInterface } from 'sequelize';

interface Migration {
  readonly context: QueryInterface;
}

/**
 * Frame documents by content: canonical JSON (RFC 8785) under its own SHA-256, once per team. Kept as text, not
 * jsonb, so that the database itself can check the fingerprint over the very bytes.
 */
export async function up({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(
      `CREATE DOMAIN sha256_hex AS text CHECK (VALUE ~ '^[0-9a-f]{64}$');

      CREATE TABLE frame_documents (
        team_id uuid NOT NULL REFERENCES teams (id),
        fingerprint sha256_hex NOT NULL,
        document text NOT NULL,
        created_at timestamptz NOT NULL DEFAULT now(),
        PRIMARY KEY (team_id, fingerprint),
        CHECK (fingerprint = encode(sha256(convert_to(document, 'UTF8')), 'hex'))
      );
      CREATE TRIGGER frame_documents_kept BEFORE UPDATE OR DELETE OR TRUNCATE ON frame_documents
        FOR EACH STATEMENT EXECUTE FUNCTION forbid_change();
      GRANT SELECT, INSERT ON frame_documents TO ringstead_app;`,
      { transaction },
    );
  });
}

export async function down({ context }: Migration): Promise<void> {
  await context.sequelize.transaction(async (transaction) => {
    await context.sequelize.query(`DROP TABLE frame_documents; DROP DOMAIN sha256_hex`, {
      transaction,
    });
  });
}

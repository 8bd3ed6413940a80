import type { QueryInterface } from 'sequelize';

/** For tables whose rows are for ever: refuses UPDATE, DELETE and TRUNCATE to everybody, the owner included. */
const UP = `
  CREATE FUNCTION forbid_change() RETURNS trigger
    LANGUAGE plpgsql SET search_path = public, pg_temp AS $$
  BEGIN
    RAISE EXCEPTION '% of % is forbidden: its rows are for ever', TG_OP, TG_TABLE_NAME
      USING ERRCODE = 'insufficient_privilege';
  END $$;
`;

const DOWN = `DROP FUNCTION forbid_change()`;

interface Step {
  readonly context: QueryInterface;
}

export async function up({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(UP, { transaction }));
}

export async function down({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(DOWN, { transaction }));
}

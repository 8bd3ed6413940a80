import type { QueryInterface } from 'sequelize';

/** The shape that connect-pg-simple expects; a session knows its person in `sess`. */
const UP = `
  CREATE TABLE sessions (
    sid text PRIMARY KEY,
    sess json NOT NULL,
    expire timestamp(6) NOT NULL
  );
  CREATE INDEX sessions_expire ON sessions (expire);
  CREATE INDEX sessions_person ON sessions ((sess #>> '{passport,user,personId}'));
  GRANT SELECT, INSERT, UPDATE, DELETE ON sessions TO ringstead_app;
`;

const DOWN = `DROP TABLE sessions`;

interface Step {
  readonly context: QueryInterface;
}

export async function up({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(UP, { transaction }));
}

export async function down({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(DOWN, { transaction }));
}

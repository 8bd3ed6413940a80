import type { QueryInterface } from 'sequelize';

/** The shape that rate-limiter-flexible expects; `expire` is in milliseconds since 1970. */
const UP = `
  CREATE TABLE rate_limits (
    key varchar(255) PRIMARY KEY,
    points integer NOT NULL DEFAULT 0,
    expire bigint
  );
  GRANT SELECT, INSERT, UPDATE, DELETE ON rate_limits TO ringstead_app;
`;

const DOWN = `DROP TABLE rate_limits`;

interface Step {
  readonly context: QueryInterface;
}

export async function up({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(UP, { transaction }));
}

export async function down({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(DOWN, { transaction }));
}

import type { QueryInterface } from 'sequelize';

/** Mail that the local fake server took; a real mail server leaves this table empty. */
const UP = `
  CREATE TABLE sent_mail (
    id uuid PRIMARY KEY,
    team_id uuid NOT NULL REFERENCES teams,
    "to" text NOT NULL,
    subject text NOT NULL,
    text text NOT NULL,
    sent_at timestamptz NOT NULL
  );
  CREATE INDEX sent_mail_newest ON sent_mail (team_id, sent_at DESC);
  GRANT SELECT, INSERT ON sent_mail TO ringstead_app;
`;

const DOWN = `DROP TABLE sent_mail`;

interface Step {
  readonly context: QueryInterface;
}

export async function up({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(UP, { transaction }));
}

export async function down({ context: { sequelize } }: Step): Promise<void> {
  await sequelize.transaction((transaction) => sequelize.query(DOWN, { transaction }));
}

import { createPerson } from '#server/commands/createPerson.ts';
import { createTeam } from '#server/commands/createTeam.ts';
import { readConfig } from '#server/config/config.ts';
import { createLog } from '#server/config/log.ts';
import { connectDatabase, inTransaction } from '#server/models/database.ts';
import { Person } from '#server/models/Person.ts';
import { Project } from '#server/models/Project.ts';
import { Team } from '#server/models/Team.ts';
import { startJobs, stopJobs } from '#server/workers/jobs.ts';
import { PEOPLE, TEAM } from './demo/people.ts';
import { play, STORIES } from './demo/stories.ts';

export { demoSignIns } from './demo/people.ts';

/**
 * Fills in what is missing of the demo: the team, its people, five projects in different states. Everything goes
 * through the product's own commands, so that audit chain, mail and lock records are as they would be. A project
 * that is there is left as it is.
 */
export async function seedDemo(): Promise<void> {
  const config = readConfig(process.env);
  const database = connectDatabase(config.databaseUrl, config.databasePool);
  await startJobs(config, createLog(config));
  try {
    if (!(await Team.findByPk(TEAM.id))) {
      await inTransaction((transaction) => createTeam(transaction, TEAM));
    }
    for (const person of Object.values(PEOPLE)) {
      if (await Person.findByPk(person.id)) continue;
      await inTransaction((transaction) => createPerson(transaction, person));
    }
    for (const story of STORIES) {
      if (!(await Project.findByPk(story.id))) await play(story);
    }
  } finally {
    await stopJobs();
    await database.close();
  }
}

import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startApp, type TestApp } from '#tests/api/setup/app.ts';
import { signedIn, visitor } from '#tests/api/setup/client.ts';
import { table, verdictAt, type Row, type Verdict } from './access/table.ts';
import { ACTORS, aWorld, type Asker, type World } from './access/world.ts';

let app: TestApp;
let world: World;

beforeAll(async () => {
  app = await startApp();
  world = await aWorld(app.express);
});
afterAll(() => app.stop());

const REFUSALS: Readonly<Record<number, Verdict>> = { 401: 'signIn', 403: 'mayNot', 404: 'hidden' };

/** The one sentence for what does not exist and for what is not shared. */
const HIDDEN = 'There is no such thing, or it is not shared with you.';

async function ask(row: Row, { person, client }: Asker): Promise<Verdict> {
  const fresh = async () => (person ? signedIn(app.express, person) : visitor(app.express));
  const asker = { person, client: row.changesSession ? await fresh() : client };
  const { status, body } = (await row.send(asker, world)) as {
    status: number;
    body: { code?: string; detail?: string } | null;
  };
  if (row.changesSession && person) await (await client.open()).signIn(person.email);
  expect(status).toBeLessThan(500);
  // A request that its contract refuses would show nothing of access.
  expect(body?.code).not.toBe('invalid-request');
  // Who may read a solve learns that it has no shapes yet: that is no secret.
  if (status === 404 && body?.detail !== HIDDEN) return 'may';
  return REFUSALS[status] ?? 'may';
}

it('the access table has a row for every endpoint, and no other', () => {
  const served = app.routes.map(({ contract }) => `${contract.method} ${contract.path}`);
  expect(Object.keys(table).sort()).toEqual(served.sort());
});

describe.each(Object.entries(table))('%s', (_endpoint, row) => {
  it('answers everybody of the team by their role', async () => {
    const expected: Record<string, Verdict> = {};
    const found: Record<string, Verdict> = {};
    for (const [place, actor] of ACTORS.entries()) {
      expected[actor] = verdictAt(row, place);
      found[actor] = await ask(row, world.own[actor]);
    }
    expect(found).toEqual(expected);
  });

  it('answers everybody of another team alike', async () => {
    const roles = ACTORS.slice(1, 6);
    for (const [place, role] of roles.entries()) {
      const asker = world.foreign[place]!;
      const verdict = await ask(row, asker);
      const expected = row.foreign === 'own' ? verdictAt(row, ACTORS.indexOf(role)) : row.foreign;
      expect([role, verdict]).toEqual([role, expected]);
    }
  });
});

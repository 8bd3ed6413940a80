import { randomUUID } from 'node:crypto';
import { setTimeout } from 'node:timers/promises';
import { listSolves, createSolves } from '#shared/schemas/solve.ts';
import { PASSWORD, PEOPLE } from '#seeders/demo/people.ts';
import { documentOf, PRESS_RACK } from './frames.ts';

const PRESSES = 9;
/** How often it is looked whether a result is there: a part of what is measured, and not so often as to disturb it. */
const LOOK_MS = 5;

/**
 * From the press of Solve to the first and to the last of its results being stored, on a running product with the demo
 * in it: medians of some presses [ms]. Each asks for another number of modes, so that no stored result answers. Leaves a project
 * behind.
 *   base  address of the product, such as http://127.0.0.1:4600
 * Throws Error where the product refuses.
 */
export async function productPress(
  base: string,
): Promise<{ first: number; last: number; members: number }> {
  const visitor = new Visitor(base);
  await visitor.signIn(PEOPLE.mira.email, PASSWORD);
  const projectId = randomUUID();
  // A name of its own: a team shares the results of frames that are the same.
  const document = { ...documentOf(PRESS_RACK), name: `Bench ${projectId}` };
  await visitor.send('POST', '/api/projects', { id: projectId, name: 'Bench', document });
  const firsts: number[] = [];
  const lasts: number[] = [];
  for (let press = 0; press < PRESSES; press++) {
    const began = performance.now();
    const answer = await visitor.send('POST', createSolves.path, {
      projectId,
      settings: { modes: 12 + press },
    });
    const waiting = new Set(
      createSolves.response.parse(await answer.json()).solves.map(({ id }) => id),
    );
    while (waiting.size > 0) {
      await setTimeout(LOOK_MS);
      const list = await visitor.send('GET', `${listSolves.path}?projectId=${projectId}`);
      for (const { id, status, error } of listSolves.response.parse(await list.json()).solves) {
        if (status === 'failed') throw new Error(`A solve failed: ${error?.message ?? ''}`);
        if (status !== 'done' || !waiting.delete(id)) continue;
        if (firsts.length === press) firsts.push(performance.now() - began);
      }
    }
    lasts.push(performance.now() - began);
  }
  const median = (times: number[]): number => times.sort((a, b) => a - b)[PRESSES >> 1]!;
  return { first: median(firsts), last: median(lasts), members: document.members.length };
}

/** A browser: keeps cookies, and sends the token of the session with what changes state. */
class Visitor {
  readonly #base: string;
  readonly #cookies = new Map<string, string>();
  #csrfToken = '';

  constructor(base: string) {
    this.#base = base;
  }

  async signIn(email: string, password: string): Promise<void> {
    await this.#remember(await this.send('GET', '/api/session'));
    await this.#remember(await this.send('POST', '/api/session', { email, password }));
  }

  async send(method: string, path: string, body?: object): Promise<Response> {
    const response = await fetch(this.#base + path, {
      method,
      headers: {
        cookie: [...this.#cookies].map(([name, value]) => `${name}=${value}`).join('; '),
        origin: this.#base,
        ...(method === 'GET' ? {} : { 'x-csrf-token': this.#csrfToken }),
        ...(body && { 'content-type': 'application/json' }),
      },
      ...(body && { body: JSON.stringify(body) }),
    });
    if (!response.ok) throw new Error(`${method} ${path}: ${await response.text()}`);
    for (const cookie of response.headers.getSetCookie()) {
      const [pair = ''] = cookie.split(';');
      const at = pair.indexOf('=');
      this.#cookies.set(pair.slice(0, at), pair.slice(at + 1));
    }
    return response;
  }

  async #remember(response: Response): Promise<void> {
    this.#csrfToken = ((await response.json()) as { csrfToken: string }).csrfToken;
  }
}

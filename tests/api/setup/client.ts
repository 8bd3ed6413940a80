import request, { type Response, type Test } from 'supertest';
import type { Express } from 'express';
import { PASSWORD } from '#tests/builders/aPerson.ts';
import type { Person } from '#server/models/Person.ts';

type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';

/**
 * A browser: keeps cookies, and sends the token of the session with what changes state. Without a body it sends
 * none, as the client does: `Content-Length: 0`.
 */
export class Client {
  readonly agent: ReturnType<typeof request.agent>;
  csrfToken = '';

  constructor(express: Express) {
    this.agent = request.agent(express);
  }

  /** Reads /api/session, as the page does when it opens. */
  async open(): Promise<this> {
    const response = await this.agent.get('/api/session').expect(200);
    this.csrfToken = (response.body as { csrfToken: string }).csrfToken;
    return this;
  }

  async signIn(email: string, password = PASSWORD): Promise<Response> {
    const response = await this.post('/api/session', { email, password });
    if (response.status === 200) {
      this.csrfToken = (response.body as { csrfToken: string }).csrfToken;
    }
    return response;
  }

  send(method: Method, path: string, body?: object | string): Test {
    const test = this.agent[method](path);
    if (method !== 'get') void test.set('X-CSRF-Token', this.csrfToken);
    if (typeof body === 'string') void test.type('application/json');
    return body === undefined ? test : test.send(body);
  }

  get = (path: string): Test => this.send('get', path);
  post = (path: string, body?: object | string): Test => this.send('post', path, body);
  put = (path: string, body?: object | string): Test => this.send('put', path, body);
  patch = (path: string, body?: object | string): Test => this.send('patch', path, body);
  delete = (path: string): Test => this.send('delete', path);
}

/** A browser in which nobody is signed in. */
export const visitor = (express: Express): Promise<Client> => new Client(express).open();

/** A browser in which the person is signed in, with the password of the builders. */
export async function signedIn(express: Express, person: Person): Promise<Client> {
  const client = await visitor(express);
  const response = await client.signIn(person.email);
  if (response.status !== 200) throw new Error(`Sign-in failed: ${response.text}`);
  return client;
}

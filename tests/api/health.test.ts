import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import request from 'supertest';
import { startApp, type TestApp } from '#tests/api/setup/app.ts';
import { asOwner } from '#tests/api/setup/owner.ts';

let app: TestApp;
beforeAll(async () => {
  app = await startApp();
});
afterAll(() => app.stop());

describe('health', () => {
  it('says that the process is up', async () => {
    const response = await request(app.express).get('/api/health');
    expect(response.status).toBe(200);
    expect(response.body).toEqual({ status: 'up' });
  });

  it('says that everything is ready', async () => {
    const response = await request(app.express).get('/api/ready');
    expect(response.status).toBe(200);
    expect(response.body).toEqual({ database: true, migrations: true, solver: true });
  });

  it('says what is not ready: a migration that was not run', async () => {
    const name = '20261201-0001-create-teams.ts';
    await asOwner(app.database, `DELETE FROM "SequelizeMeta" WHERE name = :name`, { name });
    const response = await request(app.express).get('/api/ready');
    expect(response.status).toBe(503);
    expect(response.body).toMatchObject({ details: { database: true, migrations: false } });
    await asOwner(app.database, `INSERT INTO "SequelizeMeta" VALUES (:name)`, { name });
  });
});

describe('the OpenAPI document', () => {
  it('lists every endpoint that is served, with the schema of what it takes', async () => {
    const response = await request(app.express).get('/api/openapi.json').expect(200);
    const { openapi, paths } = response.body as {
      openapi: string;
      paths: Record<string, Record<string, { requestBody?: unknown }>>;
    };
    expect(openapi).toBe('3.1.0');
    const listed = Object.entries(paths).flatMap(([path, methods]) =>
      Object.keys(methods).map((method) => `${method} ${path}`),
    );
    const served = app.routes.map(
      ({ contract }) => `${contract.method} ${contract.path.replace(/:(\w+)/g, '{$1}')}`,
    );
    expect(listed.sort()).toEqual(served.sort());
    expect(JSON.stringify(paths['/api/session']?.['post']?.requestBody)).toContain('password');
  });
});

describe('what is no endpoint', () => {
  it('below /api answers a problem document, never the page', async () => {
    const response = await request(app.express).get('/api/no-such-thing');
    expect(response.status).toBe(404);
    expect(response.type).toBe('application/problem+json');
    expect(response.body).toMatchObject({ code: 'not-found', status: 404, title: 'Not Found' });
  });
});

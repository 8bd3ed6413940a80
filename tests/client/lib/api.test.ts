import { afterEach, expect, it, vi } from 'vitest';
import { readProject, updateProject } from '#shared/schemas/project.ts';
import { signOut } from '#shared/schemas/session.ts';
import { ApiError, call, rememberCsrfToken } from '#src/lib/api.ts';
import { aProblem, fakeServer } from '../render.tsx';

afterEach(() => vi.unstubAllGlobals());

const projectId = '3f0e8c6a-0c43-4c8f-9a52-0d5ad2c1a003';

it('fetches the present token once and repeats a request refused for its token', async () => {
  rememberCsrfToken('of yesterday');
  const sent = fakeServer({
    'DELETE /api/session': ({ headers }) =>
      headers.get('x-csrf-token') === 'of today'
        ? new Response(null, { status: 204 })
        : aProblem(403, 'forbidden', 'No token.', { details: { reason: 'csrf' } }),
    'GET /api/session': () =>
      Response.json({ person: null, csrfToken: 'of today', mailIsLocal: false }),
  });
  await expect(call(signOut, {})).resolves.toBeUndefined();
  expect(sent.map((request) => request.method)).toEqual(['DELETE', 'GET', 'DELETE']);
});

it('repeats no other refusal', async () => {
  const sent = fakeServer({
    [`PATCH /api/projects/${projectId}`]: () => aProblem(403, 'forbidden', 'Designers only.'),
  });
  const attempt = call(updateProject, { params: { projectId }, body: { name: 'New' } });
  await expect(attempt).rejects.toMatchObject({ status: 403, message: 'Designers only.' });
  expect(sent).toHaveLength(1);
});

it('tells a lost connection from an answer', async () => {
  vi.stubGlobal('fetch', () => Promise.reject(new TypeError('fetch failed')));
  const attempt = call(readProject, { params: { projectId } });
  await expect(attempt).rejects.toBeInstanceOf(ApiError);
  await expect(attempt).rejects.toMatchObject({ status: 0 });
});

it('does not take an answer that breaks the contract', async () => {
  fakeServer({ [`GET /api/projects/${projectId}`]: () => Response.json({ id: projectId }) });
  await expect(call(readProject, { params: { projectId } })).rejects.toThrow();
});

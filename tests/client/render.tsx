import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render } from '@testing-library/react';
import type { ReactNode } from 'react';
import { createMemoryRouter, RouterProvider, type RouteObject } from 'react-router-dom';
import { vi } from 'vitest';
import type { SessionResponse, SignedInPerson } from '#shared/schemas/session.ts';
import { CommandProvider } from '#src/components/commands/CommandProvider.tsx';
import { queryKeys } from '#src/lib/queryKeys.ts';

export const aPerson = (part: Partial<SignedInPerson> = {}): SignedInPerson => ({
  id: '3f0e8c6a-0c43-4c8f-9a52-0d5ad2c1a001',
  name: 'Ines Falk',
  email: 'ines@example.com',
  role: 'designer',
  isAdministrator: false,
  units: 'mm-kg-N',
  theme: 'paper',
  team: { id: '3f0e8c6a-0c43-4c8f-9a52-0d5ad2c1a002', name: 'Halden Works' },
  abilities: { createProject: true, administerTeam: false, readSentMail: false },
  ...part,
});

interface RenderOptions {
  /** Who is signed in; null: nobody. */
  person?: SignedInPerson | null;
  path?: string;
  /** Further screens to arrive at. */
  routes?: RouteObject[];
}

/** Draws a screen inside what every screen has around it. */
export function renderScreen(screen: ReactNode, options: RenderOptions = {}) {
  const { person = aPerson(), path = '/', routes = [] } = options;
  const client = new QueryClient({ defaultOptions: { queries: { retry: false } } });
  const session: SessionResponse = { person, csrfToken: 'token-of-the-test', mailIsLocal: true };
  client.setQueryData(queryKeys.session, session);
  const router = createMemoryRouter(
    [{ path: path.split('?')[0] ?? '/', element: screen }, ...routes],
    { initialEntries: [path] },
  );
  const drawn = render(
    <QueryClientProvider client={client}>
      <CommandProvider>
        <RouterProvider router={router} />
      </CommandProvider>
    </QueryClientProvider>,
  );
  return { ...drawn, router, client };
}

export interface SentRequest {
  method: string;
  path: string;
  headers: Headers;
  body: unknown;
}

/** Stands in for the server: answers by "METHOD /path", keeps what was asked. */
export function fakeServer(
  answers: Record<string, (request: SentRequest) => Response | Promise<Response>>,
): SentRequest[] {
  const sent: SentRequest[] = [];
  vi.stubGlobal('fetch', async (address: string, init: RequestInit = {}) => {
    const request: SentRequest = {
      method: init.method ?? 'GET',
      path: address,
      headers: new Headers(init.headers),
      body: typeof init.body === 'string' ? (JSON.parse(init.body) as unknown) : undefined,
    };
    sent.push(request);
    const answer = answers[`${request.method} ${address}`];
    if (!answer) throw new Error(`The test has no answer for ${request.method} ${address}`);
    return answer(request);
  });
  return sent;
}

export const aProblem = (
  status: number,
  code: string,
  detail: string,
  more: { headers?: Record<string, string>; details?: Record<string, unknown> } = {},
): Response =>
  Response.json(
    {
      type: 'about:blank',
      title: 'Refused',
      status,
      detail,
      code,
      ...(more.details ? { details: more.details } : {}),
    },
    { status, headers: more.headers ?? {} },
  );

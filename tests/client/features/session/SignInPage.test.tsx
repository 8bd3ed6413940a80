import { screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, expect, it, vi } from 'vitest';
import SignInPage from '#src/features/session/components/SignInPage.tsx';
import { aPerson, aProblem, fakeServer, renderScreen } from '../../render.tsx';

afterEach(() => vi.unstubAllGlobals());

const arrivals = [
  { path: '/projects', element: <p>the projects</p> },
  { path: '/team', element: <p>the team</p> },
];
const draw = (path = '/sign-in') =>
  renderScreen(<SignInPage />, { person: null, path, routes: arrivals });

async function enter(email: string, password: string) {
  await userEvent.type(screen.getByLabelText('E-mail'), email);
  await userEvent.type(screen.getByLabelText('Password'), password);
  await userEvent.click(screen.getByRole('button', { name: 'Sign in' }));
}

it('asks for what is missing without asking the server', async () => {
  const sent = fakeServer({});
  draw();
  await userEvent.click(screen.getByRole('button', { name: 'Sign in' }));
  expect(await screen.findByText('Enter your password.')).toBeInTheDocument();
  expect(screen.getByLabelText('E-mail')).toBeInvalid();
  expect(screen.getByLabelText('E-mail')).toHaveFocus();
  expect(sent).toHaveLength(0);
});

it('says the server’s sentence for wrong credentials and keeps the address', async () => {
  fakeServer({
    'POST /api/session': () =>
      aProblem(401, 'wrong-credentials', 'The address or the password is not right.'),
  });
  draw();
  await enter('ines@example.com', 'wrong');
  expect(await screen.findByRole('alert')).toHaveTextContent(
    'The address or the password is not right.',
  );
  expect(screen.getByLabelText('E-mail')).toHaveValue('ines@example.com');
});

it('says how long to wait after too many tries', async () => {
  fakeServer({
    'POST /api/session': () =>
      aProblem(429, 'too-many-requests', 'Too many.', { headers: { 'retry-after': '150' } }),
  });
  draw();
  await enter('ines@example.com', 'wrong');
  expect(await screen.findByRole('alert')).toHaveTextContent('Try again in 3 minutes.');
});

it('goes on to where the person wanted to go, but never to another site', async () => {
  const session = { person: aPerson(), csrfToken: 'next', mailIsLocal: true };
  const sent = fakeServer({ 'POST /api/session': () => Response.json(session) });
  draw('/sign-in?next=%2Fteam');
  await enter('Ines@Example.com', 'a long pass phrase');
  expect(await screen.findByText('the team')).toBeInTheDocument();
  expect(sent[0]?.body).toEqual({ email: 'ines@example.com', password: 'a long pass phrase' });
});

it.each(['//elsewhere.example', 'https://elsewhere.example', '/\\elsewhere.example'])(
  'falls back to Projects for next=%s',
  async (next) => {
    fakeServer({
      'POST /api/session': () =>
        Response.json({ person: aPerson(), csrfToken: 'next', mailIsLocal: true }),
    });
    draw(`/sign-in?next=${encodeURIComponent(next)}`);
    await enter('ines@example.com', 'a long pass phrase');
    expect(await screen.findByText('the projects')).toBeInTheDocument();
  },
);

import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import { checkDocument } from '#shared/frame/checkDocument.ts';
import NewProjectPage from '#src/features/projects/components/NewProjectPage.tsx';
import { aPerson, fakeServer, renderScreen } from '../../render.tsx';

// mathjs is fetched when a field first appears; the tests are about what follows.
beforeAll(() => import('#src/lib/quantityExpression.ts'), 60_000);
afterEach(() => vi.unstubAllGlobals());

const NODE = { id: 'a', x: 0, z: 0 };
const file = (content: string) => new File([content], 'frame.json', { type: 'application/json' });
const choose = (content: string) =>
  userEvent.upload(screen.getByLabelText('Frame document'), file(content));
const draw = (from: string) =>
  renderScreen(<NewProjectPage />, { path: `/projects/new?from=${from}` });

describe('import', () => {
  it('lists every refusal with its place and sends nothing', async () => {
    const sent = fakeServer({});
    draw('import');
    await choose(
      JSON.stringify({
        name: 'Broken',
        nodes: [NODE, NODE],
        members: [
          { id: 'leg', kind: 'beam', start: 'a', end: 'nowhere', material: 'tin', section: 'box' },
        ],
      }),
    );
    const alert = await screen.findByRole('alert');
    const refusals = within(alert).getAllByRole('listitem');
    expect(refusals.length).toBeGreaterThanOrEqual(4);
    for (const path of ['nodes.1.id', 'members.0.end', 'members.0.material', 'members.0.section']) {
      expect(within(alert).getByText(path)).toBeInTheDocument();
    }
    expect(screen.queryByRole('button', { name: 'Begin with this frame' })).toBeNull();
    expect(sent).toHaveLength(0);
  });

  it('says that a file is no JSON', async () => {
    fakeServer({});
    draw('import');
    await choose('{ "name": ');
    expect(await screen.findByRole('alert')).toHaveTextContent('The file is no JSON');
  });

  it('takes a sound document, with its name for the project', async () => {
    fakeServer({});
    draw('import');
    await choose(JSON.stringify({ name: 'Winder stand', nodes: [NODE] }));
    expect(await screen.findByLabelText('Project')).toHaveValue('Winder stand');
    expect(screen.getByRole('button', { name: 'Begin with this frame' })).toBeEnabled();
  });
});

describe('starters', () => {
  const answer = () => Response.json({ title: 'down' }, { status: 503 });

  it('does not choose the feet for the designer', async () => {
    const sent = fakeServer({});
    draw('stand');
    await userEvent.type(screen.getByLabelText('Project'), 'Winder stand');
    await userEvent.click(screen.getByRole('button', { name: 'Begin with this frame' }));
    expect(await screen.findByText('Choose what the frame stands on.')).toBeInTheDocument();
    expect(sent).toHaveLength(0);
  });

  it('builds a document that passes the check from what was typed', async () => {
    const sent = fakeServer({ 'POST /api/projects': answer });
    draw('stand');
    await userEvent.type(screen.getByLabelText('Project'), 'Winder stand');
    const length = screen.getByRole('textbox', { name: 'Length along X' });
    await userEvent.clear(length);
    await userEvent.type(length, '1.5 m + 100 mm');
    expect(await screen.findByText('= 1600 mm')).toBeInTheDocument();
    await userEvent.selectOptions(screen.getByLabelText('Kind of foot'), 'fixed');
    await userEvent.click(screen.getByRole('button', { name: 'Begin with this frame' }));
    await vi.waitFor(() => expect(sent).toHaveLength(1));
    const { document, name } = sent[0]?.body as { document: unknown; name: string };
    expect(name).toBe('Winder stand');
    const checked = checkDocument(document);
    expect(checked.errors).toEqual([]);
    expect(Math.max(...(checked.document?.nodes.map((node) => node.x) ?? []))).toBeCloseTo(1.6, 9);
  });

  it('holds back while a field is wrong', async () => {
    const sent = fakeServer({});
    draw('stand');
    await userEvent.type(screen.getByLabelText('Project'), 'Winder stand');
    await userEvent.selectOptions(screen.getByLabelText('Kind of foot'), 'fixed');
    const mass = screen.getByRole('textbox', { name: 'Mass' });
    await userEvent.clear(mass);
    await userEvent.type(mass, '80 mm');
    await userEvent.click(screen.getByRole('button', { name: 'Begin with this frame' }));
    expect(await screen.findByText(/a mass is wanted/)).toBeInTheDocument();
    expect(sent).toHaveLength(0);
  });
});

it('tells a guest who begins projects', () => {
  renderScreen(<NewProjectPage />, {
    path: '/projects/new',
    person: aPerson({
      role: 'guest',
      abilities: { createProject: false, administerTeam: false, readSentMail: false },
    }),
  });
  expect(screen.getByText(/Ask a designer/)).toBeInTheDocument();
  expect(screen.queryByRole('radio')).toBeNull();
});

import { randomUUID } from 'node:crypto';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import { DEFAULT_SOLVE_SETTINGS } from '#shared/schemas/solveResult.ts';
import { approveRevision } from '#server/commands/approveRevision.ts';
import { commentRevision } from '#server/commands/commentRevision.ts';
import { createProject } from '#server/commands/createProject.ts';
import { acceptRevision, returnRevision } from '#server/commands/reviewRevision.ts';
import { shareProject } from '#server/commands/shareProject.ts';
import { submitRevision } from '#server/commands/submitRevision.ts';
import { writeDraft } from '#server/commands/writeDraft.ts';
import { Draft } from '#server/models/Draft.ts';
import { Person } from '#server/models/Person.ts';
import {
  balancingRig,
  coolantPumpStand,
  coolantPumpStandFixed,
  exhaustFanSkid,
  feederStand,
  fillingStation,
} from './frames.ts';
import { PEOPLE } from './people.ts';
import { solveHere } from './solveHere.ts';

/** A project on its way: who works on it, what it is called, and the steps people took. */
interface Story {
  readonly id: string;
  readonly name: string;
  readonly machine: string;
  readonly designer: keyof typeof PEOPLE;
  readonly document: FrameDocument;
  readonly sharedWith: readonly (keyof typeof PEOPLE)[];
  readonly steps: (on: Steps) => Promise<void>;
}

interface Steps {
  readonly solve: () => Promise<void>;
  readonly change: (document: FrameDocument) => Promise<void>;
  readonly submit: (changeNote: string) => Promise<string>;
  readonly comment: (who: keyof typeof PEOPLE, revisionId: string, body: string) => Promise<void>;
  readonly accept: (revisionId: string, comment: string) => Promise<void>;
  readonly giveBack: (revisionId: string, comment: string) => Promise<void>;
  readonly approve: (revisionId: string) => Promise<void>;
}

const projectId = (last: number): string => `6f2d7c1e-3a54-4f0b-9c86-51d2a7be020${last}`;

/** Five projects, so that every role has something waiting. */
export const STORIES: readonly Story[] = [
  {
    id: projectId(1),
    name: 'Filling station frame',
    machine: 'FS-12 filling station',
    designer: 'jonah',
    document: fillingStation('SHS 100x5'),
    sharedWith: ['noor', 'tomas'],
    steps: async (on) => {
      await on.solve();
      const first = await on.submit('First issue, tank full and empty.');
      await on.accept(
        first,
        'Both states checked. Tap test advised: the tank is most of the mass.',
      );
      await on.approve(first);
      await on.change(fillingStation('SHS 120x6'));
      await on.solve();
      const second = await on.submit(
        'Legs and rails from SHS 100×5 to SHS 120×6: more room above the drive.',
      );
      await on.accept(second, 'Agreed.');
      await on.approve(second);
      await on.change(fillingStation('SHS 120x6', 455));
    },
  },
  {
    id: projectId(2),
    name: 'Press feeder stand',
    machine: 'PF-3 press feeder',
    designer: 'mira',
    document: feederStand(),
    sharedWith: ['noor'],
    steps: async (on) => {
      await on.solve();
      const first = await on.submit('Cross-rail bolted with end plates, joints as springs.');
      await on.comment('agnes', first, 'Where does the 160 kN·m/rad of the end plates come from?');
      await on.comment(
        'mira',
        first,
        'Estimated from plate bending, 12 mm plate; stated as such in the notes.',
      );
      await on.accept(first, 'Accepted with that estimate; to be confirmed by tap test.');
      await on.approve(first);
    },
  },
  {
    id: projectId(3),
    name: 'Balancing rig portal',
    machine: 'BR-900 balancing rig',
    designer: 'mira',
    document: balancingRig(),
    sharedWith: ['tomas'],
    steps: async (on) => {
      await on.solve();
      const first = await on.submit('Carriage left, middle, right; feet grouted in.');
      await on.accept(
        first,
        'Carriage positions complete; grouted feet taken as fixed, see drawing note.',
      );
    },
  },
  {
    id: projectId(4),
    name: 'Exhaust fan skid',
    machine: 'EF-630 roof exhaust fan',
    designer: 'jonah',
    document: exhaustFanSkid(),
    sharedWith: ['mira'],
    steps: async (on) => {
      await on.solve();
      await on.submit('Fan on elastomer mounts, belt guard on and off.');
    },
  },
  {
    id: projectId(5),
    name: 'Coolant pump stand',
    machine: 'CP-40 coolant pump',
    designer: 'mira',
    document: coolantPumpStandFixed(),
    sharedWith: ['noor', 'tomas', 'jonah'],
    steps: async (on) => {
      await on.solve();
      const first = await on.submit('First issue.');
      await on.giveBack(
        first,
        'The stand is on levelling feet, not cast in: state their stiffness, soft and stiff, before this goes on.',
      );
      await on.change(coolantPumpStand());
      await on.solve();
    },
  },
];

/** Plays one story through the same commands as the product's own requests. */
export async function play(story: Story): Promise<void> {
  const who = async (key: keyof typeof PEOPLE): Promise<Person> =>
    Person.findByPk(PEOPLE[key].id, { rejectOnEmpty: true });
  const designer = await who(story.designer);
  const reviewer = await who('agnes');
  const lead = await who('viktor');
  await createProject(designer, {
    id: story.id,
    name: story.name,
    machine: story.machine,
    document: story.document,
  });
  for (const key of story.sharedWith) {
    await shareProject(designer, story.id, PEOPLE[key].id, true);
  }
  const draftVersion = async (): Promise<number> =>
    (await Draft.findByPk(story.id, { rejectOnEmpty: true })).version;
  await story.steps({
    solve: () => solveHere(designer, story.id),
    change: async (document) => {
      await writeDraft(designer, story.id, { version: await draftVersion(), document });
    },
    submit: async (changeNote) =>
      submitRevision(designer, story.id, {
        draftVersion: await draftVersion(),
        changeNote,
        settings: DEFAULT_SOLVE_SETTINGS,
      }),
    comment: async (key, revisionId, body) => {
      await commentRevision(await who(key), revisionId, { id: randomUUID(), body });
    },
    accept: (revisionId, comment) => acceptRevision(reviewer, revisionId, comment),
    giveBack: (revisionId, comment) => returnRevision(reviewer, revisionId, comment),
    approve: (revisionId) => approveRevision(lead, revisionId),
  });
}

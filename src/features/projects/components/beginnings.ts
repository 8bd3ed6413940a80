import { STARTERS, type Starter } from '#shared/frame/starters/starters.ts';

/** What a new project can begin with. */
export interface Beginning {
  readonly id: Starter['id'] | 'import' | 'blank';
  readonly name: string;
  readonly description: string;
}

export const BEGINNINGS: readonly Beginning[] = [
  ...STARTERS,
  {
    id: 'import',
    name: 'A frame document',
    description: 'A file from elsewhere, or from a colleague.',
  },
  { id: 'blank', name: 'A blank sheet', description: 'Steel, one section, and nothing drawn yet.' },
];

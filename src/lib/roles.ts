import type { Role } from '#shared/schemas/common.ts';

/** What each role may do, in one line, for lists to choose from. */
export const ROLE_DESCRIPTIONS: Readonly<Record<Role, string>> = {
  guest: 'reads shared projects and released reports',
  technician: 'guest, and records tap tests',
  designer: 'edits frames, solves, submits revisions',
  reviewer: 'reads and solves everything, accepts or returns',
  lead: 'reviewer who approves and locks',
};

import { z } from 'zod';
import { fingerprintHex, nothing, timestamp, uuid } from './common.ts';
import { endpoint } from './endpoint.ts';

export const activityEntry = z.object({
  id: uuid,
  sequence: z.int(),
  at: timestamp,
  actor: z.object({ id: uuid, name: z.string() }).nullable(),
  projectId: uuid.nullable(),
  projectName: z.string().nullable(),
  action: z.string(),
  /** One plain sentence, such as "submitted R2: stiffer legs". */
  sentence: z.string(),
  hash: fingerprintHex,
});
export type ActivityEntry = z.infer<typeof activityEntry>;

export const listActivity = endpoint({
  method: 'get',
  path: '/api/activity',
  summary:
    'What happened, newest first: in one project, or in all you may read. `before` is the sequence number to go on from.',
  status: 200,
  access: 'signed-in',
  params: nothing,
  query: z.strictObject({
    projectId: uuid.optional(),
    before: z.coerce.number().int().min(1).optional(),
    limit: z.coerce.number().int().min(1).max(200).default(50),
  }),
  body: nothing,
  response: z.object({ entries: z.array(activityEntry), nextBefore: z.int().nullable() }),
});

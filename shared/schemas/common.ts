import { z } from 'zod';

export const uuid = z.uuid();
export const timestamp = z.iso.datetime({ offset: true });
export const fingerprintHex = z.string().regex(/^[0-9a-f]{64}$/);
/** An endpoint without parameters, query or body takes exactly nothing. */
export const nothing = z.strictObject({});
/** The answer of an endpoint that says no more than "done". */
export const noContent = z.undefined();

export const ROLES = ['guest', 'technician', 'designer', 'reviewer', 'lead'] as const;
export const role = z.enum(ROLES);
export type Role = z.infer<typeof role>;

export const emailAddress = z
  .string()
  .trim()
  .max(254, 'An e-mail address has at most 254 characters.')
  .pipe(z.email('Enter an e-mail address such as name@example.com.'))
  .transform((value) => value.toLowerCase());

export const personName = z
  .string()
  .trim()
  .min(1, 'Enter a name.')
  .max(120, 'At most 120 characters.');

/** ASVS 5: long pass phrases welcome, at least 12 characters, no composition rules. */
export const newPassword = z
  .string()
  .min(12, 'Use at least 12 characters; a few words make a good pass phrase.')
  .max(200, 'Use at most 200 characters.');

/** A person as others see them; never an e-mail address outside Team. */
export const personBrief = z.object({ id: uuid, name: z.string(), role });
export type PersonBrief = z.infer<typeof personBrief>;

/** RFC 9457 problem document; `errors` lists every validation issue with its path. */
export const problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string(),
  code: z.string(),
  instance: z.string().optional(),
  errors: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
  details: z.record(z.string(), z.unknown()).optional(),
});
export type Problem = z.infer<typeof problem>;

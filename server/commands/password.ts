import { randomBytes } from 'node:crypto';
import { hash, verify, type Options } from '@node-rs/argon2';

/** OWASP's password storage cheat sheet: argon2id (the package's default), 19 MiB, 2 passes, 1 lane. */
const options: Options = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

/** Of nobody's password: what a password is compared with when the address is unknown. */
let decoy: Promise<string> | undefined;

/** The argon2id hash to store, with its salt and parameters in it. */
export const hashPassword = (password: string): Promise<string> => hash(password, options);

/**
 * Whether the password belongs to the hash.
 *
 * @param passwordHash null when there is no such person: the same work is done all the same, so that the time
 *   taken does not tell
 */
export async function verifyPassword(
  passwordHash: string | null,
  password: string,
): Promise<boolean> {
  decoy ??= hashPassword(randomBytes(24).toString('hex'));
  const matches = await verify(passwordHash ?? (await decoy), password);
  return matches && passwordHash !== null;
}

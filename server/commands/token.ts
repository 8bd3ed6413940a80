import { createHash, randomBytes } from 'node:crypto';

/** A secret for a link: 256 random bits, base64url. */
export const newToken = (): string => randomBytes(32).toString('base64url');

/** What is stored of it. A plain hash is enough: 256 random bits cannot be guessed from it. */
export const tokenHash = (token: string): string =>
  createHash('sha256').update(token).digest('hex');

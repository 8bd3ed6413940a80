import { createHash, randomUUID } from 'node:crypto';
import canonicalize from 'canonicalize';
import { QueryTypes, type Transaction } from 'sequelize';
import { AuditEntry } from '#server/models/AuditEntry.ts';
import type { AuditAction, AuditDetails } from '#server/models/auditActions.ts';
import { database } from '#server/models/database.ts';

export interface AuditRecord<A extends AuditAction> {
  readonly teamId: string;
  /** Null: nobody signed in did it. */
  readonly actorId: string | null;
  /** Null: it concerns no project. */
  readonly projectId: string | null;
  readonly action: A;
  readonly details: AuditDetails[A];
}

export interface AuditHead {
  readonly sequence: number;
  /** Hexadecimal; 64 zeros before the first entry. */
  readonly hash: string;
}

/**
 * Appends one entry to the team's chain. Holds the head of the chain until the transaction ends, so call it
 * last: entries of one team are written one after the other.
 *
 * @returns the new head, which a lock record carries
 */
export async function recordAudit<A extends AuditAction>(
  transaction: Transaction,
  record: AuditRecord<A>,
): Promise<AuditHead> {
  const { teamId, actorId, projectId, action } = record;
  const head = await lockAuditHead(transaction, teamId);
  const id = randomUUID();
  const at = new Date();
  const sequence = head.sequence + 1;
  const canonical = canonicalize({ id, sequence, at: at.toISOString(), ...record });
  if (canonical === undefined) throw new Error('An audit entry has no canonical form.');
  const hash = linkHash(head.hash, canonical);
  await AuditEntry.create(
    {
      id,
      teamId,
      sequence,
      at,
      actorId,
      projectId,
      action,
      canonical,
      previousHash: head.hash,
      hash,
    },
    { transaction },
  );
  return { sequence, hash };
}

/** hash = SHA-256(previous hash ‖ canonical text), both as UTF-8 text, hexadecimal. */
export function linkHash(previousHash: string, canonical: string): string {
  return createHash('sha256').update(previousHash).update(canonical).digest('hex');
}

async function lockAuditHead(transaction: Transaction, teamId: string): Promise<AuditHead> {
  const [head] = await database().query<AuditHead>(
    'SELECT sequence, hash FROM lock_audit_head(:teamId)',
    { replacements: { teamId }, transaction, type: QueryTypes.SELECT },
  );
  if (head === undefined) throw new Error('The audit chain has no head.');
  return head;
}

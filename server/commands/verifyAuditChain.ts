import { QueryTypes } from 'sequelize';
import { AuditEntry } from '#server/models/AuditEntry.ts';
import { database } from '#server/models/database.ts';
import { linkHash, type AuditHead } from './recordAudit.ts';

export type ChainCheck =
  | { readonly intact: true; readonly head: AuditHead }
  /** The first link that is missing, moved or altered. */
  | { readonly intact: false; readonly brokenAt: number };

const BATCH = 1_000;
const GENESIS: AuditHead = { sequence: 0, hash: '0'.repeat(64) };

/** Recomputes a team's whole chain, from the first entry to the head that the database keeps. */
export async function verifyAuditChain(teamId: string): Promise<ChainCheck> {
  const [kept = GENESIS] = await database().query<AuditHead>(
    'SELECT sequence, hash FROM audit_heads WHERE team_id = :teamId',
    { replacements: { teamId }, type: QueryTypes.SELECT },
  );
  let head = GENESIS;
  while (head.sequence < kept.sequence) {
    const entries = await AuditEntry.findAll({
      where: { teamId },
      order: [['sequence', 'ASC']],
      offset: head.sequence,
      limit: Math.min(BATCH, kept.sequence - head.sequence),
    });
    for (const entry of entries) {
      const isNext =
        entry.sequence === head.sequence + 1 &&
        entry.previousHash === head.hash &&
        entry.hash === linkHash(head.hash, entry.canonical);
      if (!isNext) return { intact: false, brokenAt: head.sequence + 1 };
      head = { sequence: entry.sequence, hash: entry.hash };
    }
    if (entries.length === 0) return { intact: false, brokenAt: head.sequence + 1 };
  }
  return head.hash === kept.hash
    ? { intact: true, head }
    : { intact: false, brokenAt: kept.sequence };
}

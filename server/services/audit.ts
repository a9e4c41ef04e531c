import type { Database } from '#server/models/database';
import type { Caller } from './who';

export interface AuditFacts {
  /** The member who did it; or crew and user by id when there is no session. */
  caller?: Caller | null;
  crewId?: string | null;
  userId?: string | null;
  /** Row of the role table, or what happened to an account, such as `session.signIn`. */
  action: string;
  object?: string | null;
  /** `ok` unless told. */
  result?: string;
}

/** Writes down who did what. Kept for as long as the database is; read by the lead. */
export async function audit(db: Database, facts: AuditFacts): Promise<void> {
  const { caller, crewId, userId, action, object, result } = facts;
  await db.auditEntries.create({
    crewId: crewId ?? caller?.crewId ?? null,
    userId: userId ?? caller?.userId ?? null,
    action,
    object: object ?? null,
    result: result ?? 'ok',
  });
}

import type { Database } from '#server/models/database';
import { Fault } from '../fault';
import { hashPassword } from '../passwords';
import { newId, newToken, tokenHash } from '../tokens';

const purpose = 'setup';

/** True until the first account exists. */
export const setUpOpen = async (db: Database): Promise<boolean> => (await db.users.count()) === 0;

/** A new one-time link's token while no account exists, and null from then on. Older ones are void. */
export async function setUpLink(db: Database): Promise<string | null> {
  await db.links.destroy({ where: { purpose } });
  if (!(await setUpOpen(db))) return null;
  const token = newToken();
  await db.links.create({ tokenHash: tokenHash(token), purpose });
  return token;
}

export interface NewLead {
  crewName: string;
  name: string;
  email: string;
  password: string;
}

/**
 * Makes the crew and its lead. `token` null is for the unattended demo only.
 * @returns the lead's id
 * @throws Fault 410 when the link was used or is not ours
 */
export async function finishSetUp(
  db: Database,
  token: string | null,
  lead: NewLead,
): Promise<{ userId: string; crewId: string }> {
  const passwordHash = await hashPassword(lead.password);
  return db.sequelize.transaction(async (transaction) => {
    // Two set-ups at once take turns; the second finds the account of the first.
    await db.sequelize.query('lock table users in exclusive mode', { transaction });
    const used = new Fault(
      410,
      'This set-up link has been used.',
      'Sign in, or ask your lead to invite you.',
    );
    if ((await db.users.count({ transaction })) > 0) throw used;
    if (token !== null) {
      const taken = await db.links.destroy({ where: { tokenHash: tokenHash(token), purpose }, transaction });
      if (taken !== 1)
        throw new Fault(
          410,
          'This set-up link is not the newest.',
          'Use the one that the last start printed.',
        );
    }
    const crewId = newId();
    const userId = newId();
    await db.crews.create({ id: crewId, name: lead.crewName }, { transaction });
    await db.users.create(
      { id: userId, name: lead.name, email: lead.email, passwordHash, lastSignInAt: new Date() },
      { transaction },
    );
    await db.memberships.create({ userId, crewId, role: 'lead' }, { transaction });
    return { userId, crewId };
  });
}

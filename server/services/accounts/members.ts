import type { Transaction } from 'sequelize';
import type { Database } from '#server/models/database';
import type { Crew } from '#shared/api/accounts';
import type { Role } from '#shared/show/roles';
import { Fault, notFound } from '../fault';
import { invitationAnswer, listInvitations } from './invitations';

/** A crew, its people by role and name, and who is invited. */
export async function readCrew(db: Database, crewId: string): Promise<Crew> {
  const crew = await db.crews.findByPk(crewId);
  if (!crew) throw notFound('crew');
  const memberships = await db.memberships.findAll({ where: { crewId }, order: [['createdAt', 'ASC']] });
  const users = await db.users.findAll({ where: { id: memberships.map((one) => one.userId) } });
  const byId = new Map(users.map((user) => [user.id, user]));
  const members = memberships.flatMap(({ userId, role }) => {
    const user = byId.get(userId);
    if (!user) return [];
    const { id, name, email, lastSignInAt } = user;
    return [{ id, name, email, role, lastSignInAt: lastSignInAt?.toISOString() ?? null }];
  });
  const invitations = (await listInvitations(db, crewId)).map(invitationAnswer);
  return { id: crew.id, name: crew.name, members, invitations };
}

/** Runs work on a member with the crew's memberships held, so that two leads cannot remove each other. */
function withMember(
  db: Database,
  crewId: string,
  userId: string,
  keepsLead: boolean,
  work: (transaction: Transaction) => Promise<unknown>,
): Promise<void> {
  return db.sequelize.transaction(async (transaction) => {
    const all = await db.memberships.findAll({
      where: { crewId },
      transaction,
      lock: transaction.LOCK.UPDATE,
    });
    const member = all.find((one) => one.userId === userId);
    if (!member) throw notFound('member');
    const leads = all.filter((one) => one.role === 'lead');
    if (!keepsLead && member.role === 'lead' && leads.length === 1)
      throw new Fault(409, 'This is the last lead of the crew.', 'Make somebody else lead first.');
    await work(transaction);
  });
}

/** Gives a member another role; the last lead stays lead. */
export const changeRole = (db: Database, crewId: string, userId: string, role: Role): Promise<void> =>
  withMember(db, crewId, userId, role === 'lead', (transaction) =>
    db.memberships.update({ role }, { where: { userId, crewId }, transaction }),
  );

/** Removes a member and the account; what they made stays. */
export const removeMember = (db: Database, crewId: string, userId: string): Promise<void> =>
  withMember(db, crewId, userId, false, async (transaction) => {
    await db.users.destroy({ where: { id: userId }, transaction });
    await db.links.destroy({ where: { object: userId }, transaction });
    await db.sequelize.query("delete from session where sess->>'userId' = :userId", {
      replacements: { userId },
      transaction,
    });
  });

import { Op } from 'sequelize';
import type { Database } from '#server/models/database';
import type { Invitation as InvitationRow } from '#server/models/invitation';
import type { Invitation, InvitationDetails } from '#shared/api/accounts';
import type { Role } from '#shared/show/roles';
import { Fault, notFound } from '../fault';
import { hashPassword } from '../passwords';
import { newId, newToken, tokenHash } from '../tokens';
import type { Caller } from '../who';

const lifeMs = 7 * 24 * 3_600_000;

export const invitationAnswer = (row: InvitationRow): Invitation => ({
  id: row.id,
  email: row.email,
  role: row.role,
  expiresAt: row.expiresAt.toISOString(),
});

/** Invitations of a crew that still wait, oldest first. */
export const listInvitations = (db: Database, crewId: string, now = Date.now()): Promise<InvitationRow[]> =>
  db.invitations.findAll({
    where: { crewId, acceptedAt: null, expiresAt: { [Op.gt]: new Date(now) } },
    order: [['createdAt', 'ASC']],
  });

/**
 * Invites an address; an older invitation of the same address is void.
 * @returns the invitation, its token for the mail, and the crew's name
 * @throws Fault 409 when the address has an account
 */
export async function invite(
  db: Database,
  caller: Caller,
  wanted: { email: string; role: Role },
  now = Date.now(),
): Promise<{ invitation: Invitation; token: string; crewName: string }> {
  if (await db.users.findOne({ where: { email: wanted.email } }))
    throw new Fault(
      409,
      `${wanted.email} has an account already.`,
      'Change the role in the list of people.',
      [{ path: 'email', message: 'Has an account already.' }],
    );
  const crew = await db.crews.findByPk(caller.crewId);
  const token = newToken();
  const row = await db.sequelize.transaction(async (transaction) => {
    await db.invitations.destroy({
      where: { crewId: caller.crewId, email: wanted.email, acceptedAt: null },
      transaction,
    });
    return db.invitations.create(
      {
        id: newId(),
        crewId: caller.crewId,
        email: wanted.email,
        role: wanted.role,
        tokenHash: tokenHash(token),
        invitedBy: caller.userId,
        expiresAt: new Date(now + lifeMs),
      },
      { transaction },
    );
  });
  return { invitation: invitationAnswer(row), token, crewName: crew?.name ?? '' };
}

/** Takes an invitation back: its link is void from now on. */
export async function revokeInvitation(db: Database, crewId: string, id: string): Promise<void> {
  if ((await db.invitations.destroy({ where: { id, crewId, acceptedAt: null } })) === 0)
    throw notFound('invitation');
}

async function findOpen(db: Database, token: string, now: number): Promise<InvitationRow> {
  const row = await db.invitations.findOne({ where: { tokenHash: tokenHash(token) } });
  if (!row || row.acceptedAt || row.expiresAt.getTime() <= now)
    throw new Fault(
      410,
      'This invitation has been used, taken back or has ended.',
      'Ask your lead for a new one.',
    );
  return row;
}

/** What an invitation says, for the page behind its link. */
export async function readInvitation(
  db: Database,
  token: string,
  now = Date.now(),
): Promise<InvitationDetails> {
  const row = await findOpen(db, token, now);
  const crew = await db.crews.findByPk(row.crewId);
  return { crewName: crew?.name ?? '', email: row.email, role: row.role };
}

/** Makes the account of an invited person. Returns the user's id. */
export async function acceptInvitation(
  db: Database,
  wanted: { token: string; name: string; password: string },
  now = Date.now(),
): Promise<string> {
  const row = await findOpen(db, wanted.token, now);
  const passwordHash = await hashPassword(wanted.password);
  return db.sequelize.transaction(async (transaction) => {
    const [taken] = await db.invitations.update(
      { acceptedAt: new Date(now) },
      { where: { id: row.id, acceptedAt: null }, transaction },
    );
    if (taken !== 1) throw new Fault(410, 'This invitation has just been used.', 'Sign in.');
    if (await db.users.findOne({ where: { email: row.email }, transaction }))
      throw new Fault(409, `${row.email} has an account already.`, 'Sign in.');
    const userId = newId();
    await db.users.create(
      { id: userId, name: wanted.name, email: row.email, passwordHash, lastSignInAt: new Date(now) },
      { transaction },
    );
    await db.memberships.create({ userId, crewId: row.crewId, role: row.role }, { transaction });
    return userId;
  });
}

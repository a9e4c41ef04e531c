import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { connect, type Database } from '#server/models/database';
import { forgetPassword, resetPassword } from '#server/services/accounts/forgotten';
import {
  acceptInvitation,
  invite,
  listInvitations,
  readInvitation,
  revokeInvitation,
} from '#server/services/accounts/invitations';
import { changeRole, readCrew, removeMember } from '#server/services/accounts/members';
import { finishSetUp, setUpLink } from '#server/services/accounts/setUp';
import type { Caller } from '#server/services/who';
import { makeCrew, makeMember } from '#tests/make/crew';
import { type FreshDatabase, freshDatabase } from '#tests/make/database';

let fresh: FreshDatabase;
let db: Database;
let lead: Caller;
const password = 'a lantern on the quay';
const person = { crewName: 'Boathouse crew', name: 'Ines Varga', email: 'ines@crew.example', password };
const hour = 3_600_000;

const outcomes = async (all: Promise<unknown>[]) =>
  (await Promise.allSettled(all))
    .map((one) => (one.status === 'fulfilled' ? 'done' : one.reason.status))
    .sort();

beforeAll(async () => {
  fresh = await freshDatabase();
  db = connect(fresh.url);
});
afterAll(async () => {
  await db.close();
  await fresh.drop();
});

describe('the first set-up', () => {
  it('takes the newest link only, and of two at once one', async () => {
    const old = await setUpLink(db);
    const token = await setUpLink(db);
    await expect(finishSetUp(db, old, person)).rejects.toMatchObject({ status: 410 });
    expect(await outcomes([finishSetUp(db, token, person), finishSetUp(db, token, person)])).toEqual([
      410,
      'done',
    ]);
    expect(await db.crews.count()).toBe(1);
    expect(await setUpLink(db)).toBeNull();
    lead = await makeCrew(db);
  });

  it('keeps neither token nor password', async () => {
    const { token } = (await forgetPassword(db, person.email)) ?? { token: '' };
    const [links, users] = await Promise.all([db.links.findAll(), db.users.findAll()]);
    const kept = JSON.stringify([links, users]);
    expect(token).toMatch(/^[\w-]{43}$/);
    expect(kept).not.toContain(token);
    expect(kept).not.toContain(password);
  });
});

describe('an invitation', () => {
  it('lasts seven days', async () => {
    const { token } = await invite(db, lead, { email: 'week@crew.example', role: 'vj' }, 0);
    const last = 7 * 24 * hour - 1;
    expect(await readInvitation(db, token, last)).toMatchObject({ role: 'vj' });
    await expect(readInvitation(db, token, last + 1)).rejects.toMatchObject({ status: 410 });
    await expect(acceptInvitation(db, { token, name: 'Moss', password }, last + 1)).rejects.toMatchObject({
      status: 410,
    });
    expect(await listInvitations(db, lead.crewId, last + 1)).toEqual([]);
  });

  it('voids the one before it', async () => {
    const wanted = { email: 'twice@crew.example', role: 'vj' } as const;
    const first = await invite(db, lead, wanted);
    const second = await invite(db, lead, wanted);
    await expect(readInvitation(db, first.token)).rejects.toMatchObject({ status: 410 });
    expect(await readInvitation(db, second.token)).toMatchObject({ email: wanted.email });
  });

  it('makes one account when it is taken up twice at once', async () => {
    const email = 'eager@crew.example';
    const { token } = await invite(db, lead, { email, role: 'vj' });
    const accept = () => acceptInvitation(db, { token, name: 'Moss', password });
    expect(await outcomes([accept(), accept()])).toEqual([410, 'done']);
    expect(await db.users.count({ where: { email } })).toBe(1);
  });

  it('of another crew cannot be taken back', async () => {
    const { invitation } = await invite(db, lead, { email: 'ours@crew.example', role: 'vj' });
    const other = await makeCrew(db);
    await expect(revokeInvitation(db, other.crewId, invitation.id)).rejects.toMatchObject({ status: 404 });
  });
});

describe('a link for a new password', () => {
  it('lasts an hour', async () => {
    const made = await forgetPassword(db, person.email, 0);
    await expect(resetPassword(db, made?.token ?? '', password, hour)).rejects.toMatchObject({ status: 410 });
  });

  it('works once, even twice at once, and voids the one before it', async () => {
    const old = await forgetPassword(db, person.email);
    const made = await forgetPassword(db, person.email);
    const reset = () => resetPassword(db, made?.token ?? '', password);
    await expect(resetPassword(db, old?.token ?? '', password)).rejects.toMatchObject({ status: 410 });
    expect(await outcomes([reset(), reset()])).toEqual([410, 'done']);
  });

  it('is no set-up link, and a set-up link is none of these', async () => {
    const made = await forgetPassword(db, person.email);
    await expect(finishSetUp(db, made?.token ?? '', person)).rejects.toMatchObject({ status: 410 });
    await expect(readInvitation(db, made?.token ?? '')).rejects.toMatchObject({ status: 410 });
  });

  it('ends with the account', async () => {
    const passing = await makeMember(db, lead.crewId, 'vj');
    const made = await forgetPassword(db, passing.email);
    await removeMember(db, lead.crewId, passing.userId);
    await expect(resetPassword(db, made?.token ?? '', password)).rejects.toMatchObject({ status: 410 });
  });

  it('is swept a day after its end', async () => {
    await forgetPassword(db, person.email, Date.now() - 26 * hour);
    const other = await makeMember(db, lead.crewId, 'vj');
    await forgetPassword(db, other.email);
    expect(await db.links.count()).toBe(1);
  });
});

describe('people', () => {
  it('of two leads who leave each other out at once, one stays', async () => {
    const one = await makeCrew(db);
    const two = await makeMember(db, one.crewId, 'lead');
    expect(
      await outcomes([
        removeMember(db, one.crewId, two.userId),
        changeRole(db, one.crewId, one.userId, 'vj'),
      ]),
    ).toEqual([409, 'done']);
    const { members } = await readCrew(db, one.crewId);
    expect(members.filter(({ role }) => role === 'lead')).toHaveLength(1);
  });

  it('of another crew are out of reach', async () => {
    const other = await makeCrew(db);
    await makeMember(db, other.crewId, 'lead');
    await expect(changeRole(db, lead.crewId, other.userId, 'vj')).rejects.toMatchObject({ status: 404 });
    await expect(removeMember(db, lead.crewId, other.userId)).rejects.toMatchObject({ status: 404 });
    const { members } = await readCrew(db, lead.crewId);
    expect(members.map(({ id }) => id)).not.toContain(other.userId);
  });
});

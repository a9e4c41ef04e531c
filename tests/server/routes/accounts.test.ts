import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accountRoutes } from '#server/routes/accounts';
import { mailRoutes } from '#server/routes/mail';
import { setUpLink } from '#server/services/accounts/setUp';
import type { KeptMail } from '#shared/api/accounts';
import { type Browser, makeTestApp, type TestApp } from '#tests/make/app';

let house: TestApp;
let lead: Browser;
const words = 'salt static and otters';
const ines = { crewName: 'Boathouse crew', name: 'Ines Varga', email: 'ines@crew.example', password: words };

const letters = async (): Promise<KeptMail[]> => (await house.browser().get('/api/mail').expect(200)).body;
const linkOf = (letter: KeptMail | undefined) => /#([A-Za-z0-9_-]+)/.exec(letter?.text ?? '')?.[1] ?? '';

/** Invites somebody and takes the invitation up: the whole way, through the mail. */
async function join(email: string, role: string): Promise<Browser> {
  await lead.post('/api/invitations', { email, role }).expect(201);
  const letter = (await letters()).find((one) => one.to === email);
  const browser = house.browser();
  await browser
    .post('/api/invitations/accept', {
      token: linkOf(letter),
      name: 'Pip Arkwright',
      password: 'a lantern on the quay',
    })
    .expect(201);
  return browser;
}

beforeAll(async () => {
  house = await makeTestApp([accountRoutes, mailRoutes]);
  const token = await setUpLink(house.db);
  lead = house.browser();
  await lead.post('/api/setup', { token, ...ines, demo: false }).expect(201);
});
afterAll(() => house.close());

describe('the set-up link', () => {
  it('makes crew and lead, who is then signed in', async () => {
    const { body } = await lead.get('/api/session').expect(200);
    expect(body).toMatchObject({
      user: { name: 'Ines Varga', role: 'lead' },
      crew: { name: 'Boathouse crew' },
    });
  });

  it('works once, and no other is given', async () => {
    expect(await setUpLink(house.db)).toBeNull();
    const again = await house.browser().post('/api/setup', { token: 'a'.repeat(43), ...ines, demo: false });
    expect(again.status).toBe(410);
    expect(again.body.mend).toContain('Sign in');
  });
});

describe('signing in', () => {
  it('gives the same answer for an unknown address as for a wrong password', async () => {
    const wrong = await house
      .browser()
      .post('/api/session', { email: ines.email, password: 'not these words' });
    const unknown = await house
      .browser()
      .post('/api/session', { email: 'no@one.example', password: 'not these words' });
    expect([wrong.status, unknown.status]).toEqual([401, 401]);
    expect(wrong.body.detail).toBe(unknown.body.detail);
  });

  it('keeps the session in PostgreSQL, under a cookie that scripts cannot read', async () => {
    const answer = await house
      .browser()
      .post('/api/session', { email: 'INES@crew.example ', password: words });
    expect(answer.status).toBe(200);
    const cookie = String(answer.headers['set-cookie']);
    expect(cookie).toMatch(/lampyrid\.sid=.*HttpOnly; SameSite=Lax/);
    const { rows } = await house.db.pool.query('select count(*)::int as count from session');
    expect(rows[0].count).toBeGreaterThan(1);
  });

  it('lists sign-ins, ends one, and its browser is out', async () => {
    const second = house.browser();
    await second.post('/api/session', { email: ines.email, password: words }).expect(200);
    const { body } = await second.get('/api/sessions').expect(200);
    const mine = body.find((one: { current: boolean }) => one.current);
    await lead.delete(`/api/sessions/${mine.id}`).expect(204);
    expect((await second.get('/api/session')).body.user).toBeNull();
    expect(house.told.some(([call]) => call === 'revoke')).toBe(true);
  });

  it('ends at signing out', async () => {
    const browser = house.browser();
    await browser.post('/api/session', { email: ines.email, password: words }).expect(200);
    await browser.delete('/api/session').expect(204);
    expect((await browser.get('/api/session')).body.user).toBeNull();
    await browser.get('/api/crew').expect(401);
  });

  it('stops guesses after ten, in words', async () => {
    const email = 'guessed@crew.example';
    for (let one = 0; one < 10; one += 1)
      await house.browser().post('/api/session', { email, password: 'x' });
    const answer = await house.browser().post('/api/session', { email, password: 'x' });
    expect(answer.status).toBe(429);
    expect(answer.body).toMatchObject({
      detail: 'Too many tries.',
      mend: expect.stringContaining('15 minutes'),
    });
  });
});

describe('what a password must be', () => {
  it.each([
    ['short', 'At least 12'],
    ['é'.repeat(40), 'At most 72 bytes'],
  ])('%s is refused with a reason', async (password, reason) => {
    const answer = await lead.post('/api/password/change', { old: words, password });
    expect(answer.status).toBe(422);
    expect(answer.body.fields[0]).toMatchObject({
      path: 'password',
      message: expect.stringContaining(reason),
    });
  });
});

describe('an invitation', () => {
  it('goes by mail, shows what it offers, and works once', async () => {
    await lead.post('/api/invitations', { email: 'moss@crew.example', role: 'operator' }).expect(201);
    const token = linkOf((await letters())[0]);
    const read = await house.browser().post('/api/invitations/read', { token }).expect(200);
    expect(read.body).toEqual({ crewName: 'Boathouse crew', email: 'moss@crew.example', role: 'operator' });
    const accept = { token, name: 'Moss Lind', password: 'a lantern on the quay' };
    await house.browser().post('/api/invitations/accept', accept).expect(201);
    await house.browser().post('/api/invitations/accept', accept).expect(410);
  });

  it('that was taken back is void', async () => {
    const { body } = await lead
      .post('/api/invitations', { email: 'late@crew.example', role: 'vj' })
      .expect(201);
    const token = linkOf((await letters())[0]);
    await lead.delete(`/api/invitations/${body.id}`).expect(204);
    await house.browser().post('/api/invitations/read', { token }).expect(410);
  });

  it('is not for an address that has an account', async () => {
    const answer = await lead.post('/api/invitations', { email: ines.email, role: 'vj' });
    expect(answer.status).toBe(409);
    expect(answer.body.fields[0].path).toBe('email');
  });

  it('cannot carry a line break into the letter', async () => {
    await lead.post('/api/invitations', { email: 'a@b.example\r\nBcc: c@d.example', role: 'vj' }).expect(422);
  });

  it('is the lead’s alone to make', async () => {
    const assistant = await join('assistant@crew.example', 'assistant');
    const answer = await assistant.post('/api/invitations', { email: 'x@y.example', role: 'lead' });
    expect(answer.status).toBe(403);
    expect(answer.body.detail).toContain('assistant');
  });
});

describe('a forgotten password', () => {
  it('is mended by a mailed link, once, and ends every sign-in', async () => {
    const browser = await join('forgetful@crew.example', 'vj');
    await house.browser().post('/api/password/forgot', { email: 'forgetful@crew.example' }).expect(204);
    await expect.poll(async () => (await letters())[0]?.subject).toBe('A new password for Lampyrid');
    const token = linkOf((await letters())[0]);
    await house
      .browser()
      .post('/api/password/reset', { token, password: 'the quay at low water' })
      .expect(204);
    await house
      .browser()
      .post('/api/password/reset', { token, password: 'the quay at low water' })
      .expect(410);
    expect((await browser.get('/api/session')).body.user).toBeNull();
    const email = 'forgetful@crew.example';
    await house.browser().post('/api/session', { email, password: 'the quay at low water' }).expect(200);
  });

  it('tells nobody whether an address is known', async () => {
    await house.browser().post('/api/password/forgot', { email: 'nobody@crew.example' }).expect(204);
  });
});

describe('a changed password', () => {
  it('ends the other sign-ins and their sockets, not this one', async () => {
    const here = await join('changing@crew.example', 'vj');
    const there = house.browser();
    const old = 'a lantern on the quay';
    await there.post('/api/session', { email: 'changing@crew.example', password: old }).expect(200);
    const wrong = await here.post('/api/password/change', { old: 'not this one', password: words });
    expect(wrong.status).toBe(422);
    expect(wrong.body.fields[0].path).toBe('old');
    house.told.length = 0;
    await here.post('/api/password/change', { old, password: words }).expect(204);
    expect(house.told).toEqual([['revoke', { sessionId: expect.any(String) }]]);
    expect((await there.get('/api/session')).body.user).toBeNull();
    await here.get('/api/crew').expect(200);
  });
});

describe('letters that do not leave', () => {
  it('leave no invitation behind, and say why', async () => {
    const send = house.context.mail.send;
    house.context.mail.send = () => Promise.reject(new Error('connection refused'));
    const answer = await lead.post('/api/invitations', { email: 'lost@crew.example', role: 'vj' });
    house.context.mail.send = send;
    expect(answer.status).toBe(502);
    expect(answer.body.detail).toContain('lost@crew.example');
    const { body } = await lead.get('/api/crew').expect(200);
    expect(JSON.stringify(body.invitations)).not.toContain('lost@crew.example');
  });
});

describe('kept letters', () => {
  it('are not for whoever comes through a proxy', async () => {
    await house.browser().get('/api/mail').set('x-forwarded-for', '203.0.113.9').expect(403);
    await lead.get('/api/mail').set('x-forwarded-for', '203.0.113.9').expect(200);
  });

  it('are the lead’s alone at a public address', async () => {
    const config = { ...house.context.config, publicUrl: 'https://show.example' };
    const published = await makeTestApp([mailRoutes], { config });
    await published.browser().get('/api/mail').expect(403);
    await published.close();
  });
});

describe('what a proxy says', () => {
  const knock = (browser: Browser, from: string) =>
    browser.post('/api/invitations/read', { token: 'a'.repeat(43) }).set('x-forwarded-for', from);

  it('counts for nothing when none was announced: guesses stay one stranger’s', async () => {
    const bare = await makeTestApp([accountRoutes]);
    for (let one = 0; one < 30; one += 1) await knock(bare.browser(), `203.0.113.${one}`).expect(410);
    await knock(bare.browser(), '203.0.113.99').expect(429);
    await bare.close();
  });

  it('tells strangers apart and makes the cookie secure at a public address', async () => {
    const config = { ...house.context.config, publicUrl: 'https://show.example' };
    const published = await makeTestApp([accountRoutes], { config });
    for (let one = 0; one < 30; one += 1) await knock(published.browser(), '203.0.113.9').expect(410);
    await knock(published.browser(), '203.0.113.9').expect(429);
    const token = await setUpLink(published.db);
    const answer = await published
      .browser()
      .post('/api/setup', { token, ...ines, demo: false })
      .set({ 'x-forwarded-for': '203.0.113.10', 'x-forwarded-proto': 'https' })
      .expect(201);
    expect(String(answer.headers['set-cookie'])).toContain('Secure');
    await published.close();
  });
});

describe('the people of a crew', () => {
  it('keep at least one lead', async () => {
    const { body } = await lead.get('/api/crew').expect(200);
    const me = body.members.find((one: { email: string }) => one.email === ines.email);
    const answer = await lead.patch(`/api/members/${me.id}`, { role: 'vj' });
    expect(answer.status).toBe(409);
    expect(answer.body.detail).toBe('This is the last lead of the crew.');
    await lead.delete(`/api/members/${me.id}`).expect(409);
  });

  it('change roles at once, and are out once removed', async () => {
    const browser = await join('passing@crew.example', 'assistant');
    const { user } = (await browser.get('/api/session')).body;
    await lead.patch(`/api/members/${user.id}`, { role: 'operator' }).expect(200);
    expect((await browser.get('/api/session')).body.user.role).toBe('operator');
    await lead.delete(`/api/members/${user.id}`).expect(204);
    await browser.get('/api/crew').expect(401);
  });
});

describe('writes', () => {
  it.each([
    ['no origin', {}],
    ['a foreign origin', { origin: 'http://evil.example' }],
    ['no page', { origin: 'null' }],
  ])('with %s are refused', async (_name, headers) => {
    const answer = await request(house.app)
      .post('/api/session')
      .set({ host: '127.0.0.1:4646', ...headers })
      .send({ email: ines.email, password: words });
    expect(answer.status).toBe(403);
  });

  it('that are no JSON are refused', async () => {
    const answer = await request(house.app)
      .post('/api/session')
      .set({ host: '127.0.0.1:4646', origin: 'http://127.0.0.1:4646', 'content-type': 'text/plain' })
      .send('email=x');
    expect(answer.status).toBe(415);
  });

  it('by a name that is not ours are refused', async () => {
    const answer = await request(house.app).get('/api/session').set({ host: 'evil.example' });
    expect(answer.status).toBe(421);
  });
});

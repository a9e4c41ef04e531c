import { once } from 'node:events';
import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';
import { describe, expect, it } from 'vitest';
import { invitationLetter, passwordLetter } from '#server/mail/letters';
import { makeMailer } from '#server/mail/makeMailer';
import { makeLog } from '#server/services/log';

const log = makeLog('silent');
const mailFrom = 'Lampyrid <lampyrid@localhost>';

describe('mail that is kept', () => {
  it('arrives as written, accents and all, newest first', async () => {
    const mail = await makeMailer({ smtpUrl: null, mailFrom }, log);
    const text = 'Größe, čaj, 灯\n\nhttp://127.0.0.1:4646/invite#abc=def';
    await mail.send({ to: 'moss@crew.example', subject: 'First', text });
    await mail.send({ to: 'pip@crew.example', subject: 'Výzva für die “Bootshaus”-Crew 灯', text });
    expect(mail.kept()).toMatchObject([
      { to: 'pip@crew.example', subject: 'Výzva für die “Bootshaus”-Crew 灯', text },
      { to: 'moss@crew.example', subject: 'First', text },
    ]);
    await mail.close();
  });

  it('is no more than the last hundred', async () => {
    const mail = await makeMailer({ smtpUrl: null, mailFrom }, log);
    const send = (subject: string) => mail.send({ to: 'moss@crew.example', subject, text: 'Hello' });
    await send('First');
    await Promise.all(Array.from({ length: 99 }, () => send('Between')));
    expect(mail.kept()?.at(-1)?.subject).toBe('First');
    await send('Last');
    const kept = mail.kept() ?? [];
    expect([kept.length, kept[0]?.subject, kept.at(-1)?.subject]).toEqual([100, 'Last', 'Between']);
    await mail.close();
  });
});

describe('mail that leaves', () => {
  it('speaks to the server of SMTP_URL and keeps nothing', async () => {
    const got: { from: string; to: string[]; raw: string }[] = [];
    const server = new SMTPServer({
      authOptional: true,
      disabledCommands: ['STARTTLS'],
      onData: (stream, { envelope }, done) => {
        const parts: Buffer[] = [];
        stream.on('data', (part: Buffer) => parts.push(part));
        stream.on('end', () => {
          const from = envelope.mailFrom ? envelope.mailFrom.address : '';
          const raw = Buffer.concat(parts).toString('utf8');
          got.push({ from, to: envelope.rcptTo.map((one) => one.address), raw });
          done();
        });
      },
    });
    server.listen(0, '127.0.0.1');
    await once(server.server, 'listening');
    const { port } = server.server.address() as AddressInfo;
    const mail = await makeMailer({ smtpUrl: `smtp://127.0.0.1:${port}`, mailFrom }, log);
    await mail.send({ to: 'moss@crew.example', subject: 'Hello', text: 'A lantern' });
    expect(mail.kept()).toBeNull();
    expect(got).toMatchObject([{ from: 'lampyrid@localhost', to: ['moss@crew.example'] }]);
    expect(got[0]?.raw).toContain('Subject: Hello');
    await mail.close();
    await new Promise<void>((resolve) => server.close(() => resolve()));
  });

  it('fails aloud when no server listens', async () => {
    const mail = await makeMailer({ smtpUrl: 'smtp://127.0.0.1:1', mailFrom }, log);
    await expect(mail.send({ to: 'a@b.example', subject: 'x', text: 'y' })).rejects.toThrow('ECONNREFUSED');
    await mail.close();
  });
});

describe('letters', () => {
  it('say who invites to what, and how long the link lasts', () => {
    const facts = {
      crewName: 'Boathouse crew',
      by: 'Ines Varga',
      role: 'vj',
      url: 'http://x/invite#t',
    } as const;
    const { subject, text } = invitationLetter('moss@crew.example', facts);
    expect(subject).toBe('Ines Varga invites you to Boathouse crew');
    expect(text).toContain('as vj');
    expect(text).toContain('http://x/invite#t');
    expect(text).toContain('seven days');
  });

  it('tell whoever did not ask for a password that nothing has changed', () => {
    const { text } = passwordLetter('moss@crew.example', { name: 'Moss', url: 'http://x/reset#t' });
    expect(text).toContain('http://x/reset#t');
    expect(text).toContain('your password stays as it is');
  });
});

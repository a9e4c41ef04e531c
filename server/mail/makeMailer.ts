import { once } from 'node:events';
import type { AddressInfo } from 'node:net';
import nodemailer from 'nodemailer';
import { SMTPServer } from 'smtp-server';
import type { Config } from '#server/config';
import type { Log } from '#server/services/log';
import type { KeptMail } from '#shared/api/accounts';
import type { Mailer } from './mailer';

const timeouts = { connectionTimeout: 5000, greetingTimeout: 5000, socketTimeout: 10_000 };

/** The mailer of a server: the mail server of SMTP_URL, or a local one that keeps what it gets. */
export async function makeMailer(config: Pick<Config, 'smtpUrl' | 'mailFrom'>, log: Log): Promise<Mailer> {
  if (!config.smtpUrl) return keepingMailer(config.mailFrom, log);
  const transport = nodemailer.createTransport({ url: config.smtpUrl, ...timeouts });
  return {
    send: async ({ to, subject, text }) => {
      await transport.sendMail({ from: config.mailFrom, to: { name: '', address: to }, subject, text });
    },
    kept: () => null,
    close: async () => transport.close(),
  };
}

const mostKept = 100;

/** Speaks SMTP with a server of its own on loopback, so that the whole way of a letter is the real one. */
async function keepingMailer(from: string, log: Log): Promise<Mailer> {
  const kept: KeptMail[] = [];
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    size: 1_000_000,
    logger: false,
    onData: (stream, session, done) => {
      const parts: Buffer[] = [];
      stream.on('data', (part: Buffer) => parts.push(part));
      stream.on('end', () => {
        const to = session.envelope.rcptTo.map(({ address }) => address).join(', ');
        kept.unshift(readLetter(Buffer.concat(parts).toString('utf8'), to));
        kept.length = Math.min(kept.length, mostKept);
        done();
      });
    },
  });
  server.on('error', (error) => log.warn({ err: error }, 'local mail'));
  server.listen(0, '127.0.0.1');
  await once(server.server, 'listening');
  const { port } = server.server.address() as AddressInfo;
  const transport = nodemailer.createTransport({
    host: '127.0.0.1',
    port,
    secure: false,
    ignoreTLS: true,
    ...timeouts,
  });
  return {
    send: async ({ to, subject, text }) => {
      await transport.sendMail({
        from,
        to: { name: '', address: to },
        subject,
        text,
        textEncoding: 'base64',
      });
    },
    kept: () => [...kept],
    close: () => {
      transport.close();
      return new Promise((resolve) => server.close(() => resolve()));
    },
  };
}

let count = 0;

/** Reads back a letter of ours: one plain part, base64, with a subject that may be encoded (RFC 2047). */
function readLetter(raw: string, to: string): KeptMail {
  const [head = '', ...rest] = raw.split('\r\n\r\n');
  const lines = head.replace(/\r\n[ \t]+/g, ' ').split('\r\n');
  const subject = lines.find((line) => /^subject:/i.test(line))?.replace(/^subject:\s*/i, '') ?? '';
  count += 1;
  return {
    id: String(count),
    to,
    subject: words(subject),
    text: Buffer.from(rest.join('\r\n\r\n'), 'base64').toString('utf8').trim(),
    at: new Date().toISOString(),
  };
}

/** Encoded words of a header: =?UTF-8?Q?…?= and =?UTF-8?B?…?=. White space between two of them does not count. */
function words(header: string): string {
  return header
    .replace(/\?=\s+=\?/g, '?==?')
    .replace(/=\?utf-8\?([qb])\?([^?]*)\?=/gi, (_all, kind: string, text: string) => {
      if (kind.toLowerCase() === 'b') return Buffer.from(text, 'base64').toString('utf8');
      const bytes = text
        .replace(/_/g, ' ')
        .replace(/=([0-9a-f]{2})/gi, (_hex, code: string) => String.fromCharCode(Number.parseInt(code, 16)));
      return Buffer.from(bytes, 'latin1').toString('utf8');
    });
}

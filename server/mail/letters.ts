import type { Role } from '#shared/show/roles';
import type { Letter } from './mailer';

/** The mail that invites somebody into a crew. */
export const invitationLetter = (
  to: string,
  facts: { crewName: string; by: string; role: Role; url: string },
): Letter => ({
  to,
  subject: `${facts.by} invites you to ${facts.crewName}`,
  text: [
    'Hello,',
    '',
    `${facts.by} would like you in the crew “${facts.crewName}”, as ${facts.role}.`,
    'Open this page to choose your name and password:',
    '',
    facts.url,
    '',
    'The link works once and lasts seven days. If you do not know what this is about, leave it be.',
  ].join('\n'),
});

/** The mail that lets somebody choose a new password. */
export const passwordLetter = (to: string, facts: { name: string; url: string }): Letter => ({
  to,
  subject: 'A new password for Lampyrid',
  text: [
    `Hello ${facts.name},`,
    '',
    'Somebody, hopefully you, asked for a new password. Choose it here:',
    '',
    facts.url,
    '',
    'The link works once and lasts an hour. If it was not you, leave it be: your password stays as it is.',
  ].join('\n'),
});

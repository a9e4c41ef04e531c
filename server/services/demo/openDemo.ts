import { randomInt } from 'node:crypto';
import type { Database } from '#server/models/database';
import { finishSetUp, setUpOpen } from '../accounts/setUp';
import type { DemoCalls } from '../demoCalls';
import { pairingWords } from '../displays/secrets';

const lead = { crewName: 'Boathouse crew', name: 'Ines Varga', email: 'lead@boathouse.example' };

/** Five words of 64, from a CSPRNG: 30 bits, enough for a demo on one's own machine behind a limit on guesses. */
const newPassword = (): string =>
  Array.from({ length: 5 }, () => pairingWords[randomInt(pairingWords.length)])
    .join(' ')
    .toLowerCase();

/**
 * Makes crew, lead and demo night without being asked; a crew that is there stays as it is.
 * @param password the lead's, or null for a new one
 * @returns lines to print for whoever started it
 */
export async function openDemo(db: Database, demo: DemoCalls, password: string | null): Promise<string[]> {
  if (!(await setUpOpen(db))) {
    const member = await db.memberships.findOne({ where: { role: 'lead' } });
    if (member) demo.make(member.crewId, member.userId);
    return ['A crew is here already: sign in as before.'];
  }
  const chosen = password ?? newPassword();
  const { userId, crewId } = await finishSetUp(db, null, { ...lead, password: chosen });
  demo.make(crewId, userId);
  return [
    `Sign in as ${lead.email} with the password: ${chosen}`,
    'The demo night is being made; it takes half a minute.',
  ];
}

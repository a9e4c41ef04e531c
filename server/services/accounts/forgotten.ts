import type { Database } from '#server/models/database';
import { Fault } from '../fault';
import { hashPassword } from '../passwords';
import { sweepLinks } from '../sessions';
import { newToken, tokenHash } from '../tokens';

const purpose = 'password';
const lifeMs = 3_600_000;

/** A one-time token for a new password, and whose; null when nobody has this address. Older ones are void. */
export async function forgetPassword(
  db: Database,
  email: string,
  now = Date.now(),
): Promise<{ token: string; name: string } | null> {
  const user = await db.users.findOne({ where: { email } });
  if (!user) return null;
  await sweepLinks(db, now);
  const token = newToken();
  await db.links.destroy({ where: { purpose, object: user.id } });
  await db.links.create({
    tokenHash: tokenHash(token),
    purpose,
    object: user.id,
    expiresAt: new Date(now + lifeMs),
  });
  return { token, name: user.name };
}

/**
 * Sets a new password by a mailed token.
 * @returns whose
 * @throws Fault 410 when the token was used, has ended or is not ours
 */
export async function resetPassword(
  db: Database,
  token: string,
  password: string,
  now = Date.now(),
): Promise<string> {
  const ended = new Fault(
    410,
    'This link has been used or has ended.',
    'Ask for a new one: it lasts an hour.',
  );
  const link = await db.links.findOne({ where: { tokenHash: tokenHash(token), purpose } });
  if (!link?.object || !link.expiresAt || link.expiresAt.getTime() <= now) throw ended;
  const passwordHash = await hashPassword(password);
  // Whoever removes the row has the link: of two at once the second comes too late.
  if ((await db.links.destroy({ where: { tokenHash: link.tokenHash } })) !== 1) throw ended;
  const [changed] = await db.users.update({ passwordHash }, { where: { id: link.object } });
  if (changed !== 1) throw ended;
  return link.object;
}

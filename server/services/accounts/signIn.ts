import type { Database } from '#server/models/database';
import { Fault } from '../fault';
import { checkPassword, hashPassword } from '../passwords';

/**
 * Who has this address and password.
 * @throws Fault 401, the same for an unknown address as for a wrong password
 */
export async function signIn(db: Database, email: string, password: string): Promise<string> {
  const user = await db.users.findOne({ where: { email } });
  const fits = await checkPassword(password, user?.passwordHash ?? null);
  if (!user || !fits)
    throw new Fault(401, 'Mail and password do not fit.', 'Try again, or ask for a new password below.');
  await user.update({ lastSignInAt: new Date() });
  return user.id;
}

/**
 * Changes a password that is known.
 * @throws Fault 422 when the old one does not fit
 */
export async function changePassword(
  db: Database,
  userId: string,
  old: string,
  password: string,
): Promise<void> {
  const user = await db.users.findByPk(userId);
  if (!user || !(await checkPassword(old, user.passwordHash)))
    throw new Fault(422, 'The password of now does not fit.', 'Type the one you signed in with.', [
      { path: 'old', message: 'Does not fit.' },
    ]);
  await user.update({ passwordHash: await hashPassword(password) });
}

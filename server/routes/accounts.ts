import { Router } from 'express';
import { invitationLetter, passwordLetter } from '#server/mail/letters';
import { forgetPassword, resetPassword } from '#server/services/accounts/forgotten';
import {
  acceptInvitation,
  invite,
  readInvitation,
  revokeInvitation,
} from '#server/services/accounts/invitations';
import { changeRole, readCrew, removeMember } from '#server/services/accounts/members';
import { finishSetUp, setUpOpen } from '#server/services/accounts/setUp';
import { changePassword, signIn } from '#server/services/accounts/signIn';
import { audit } from '#server/services/audit';
import { Fault, notFound } from '#server/services/fault';
import { endOtherSessions, endSession, listSessions, sessionCaller } from '#server/services/sessions';
import {
  acceptSchema,
  changePasswordSchema,
  changeRoleSchema,
  forgotSchema,
  inviteSchema,
  readInvitationSchema,
  resetSchema,
  type Session,
  setUpSchema,
  signInSchema,
} from '#shared/api/accounts';
import type { RouteContext } from './context';
import { guesses } from './limits';
import { type Ask, route } from './route';
import { beginSession, leaveSession } from './session';

const quarter = 15 * 60_000;

/** Accounts: set-up, signing in and out, passwords, invitations, people. */
export const accountRoutes = (context: RouteContext): Router => {
  const router = Router();
  // By address and mail, so that a stranger's guesses lock no one out; and by address, against one guess at each mail.
  router.post('/api/session', guesses({ windowMs: quarter, most: 60, failures: true }));
  router.post('/api/session', guesses({ windowMs: quarter, most: 10, by: 'email', failures: true }));
  router.post('/api/password/forgot', guesses({ windowMs: 4 * quarter, most: 5, by: 'email' }));
  router.post(
    ['/api/setup', '/api/password/reset', '/api/invitations/read', '/api/invitations/accept'],
    guesses({ windowMs: quarter, most: 30, failures: true }),
  );
  router.post('/api/password/change', guesses({ windowMs: quarter, most: 10, failures: true }));
  sessionRoutes(router, context);
  setUpRoutes(router, context);
  passwordRoutes(router, context);
  invitationRoutes(router, context);
  memberRoutes(router, context);
  return router;
};

/** Who is signed in now, as pages want to know it. */
async function sessionAnswer({ db, mail }: RouteContext, { request }: Ask<unknown>): Promise<Session> {
  const caller = await sessionCaller(db, request.session);
  const crew = caller && (await db.crews.findByPk(caller.crewId));
  return {
    user: caller && { id: caller.userId, name: caller.name, email: caller.email, role: caller.role },
    crew: crew && { id: crew.id, name: crew.name },
    setUpOpen: !caller && (await setUpOpen(db)),
    mailKept: mail.kept() !== null,
  };
}

function sessionRoutes(router: Router, context: RouteContext): void {
  const { db, hub } = context;
  route(router, { method: 'get', path: '/api/session', action: 'session.read' }, (ask) =>
    sessionAnswer(context, ask),
  );
  route(
    router,
    { method: 'post', path: '/api/session', action: 'session.signIn', body: signInSchema },
    async (ask) => {
      try {
        const userId = await signIn(db, ask.body.email, ask.body.password);
        await beginSession(ask.request, userId);
        await audit(db, { userId, action: 'session.signIn' });
      } catch (error) {
        await audit(db, { action: 'session.signIn', object: ask.body.email, result: 'refused' });
        throw error;
      }
      return sessionAnswer(context, ask);
    },
  );
  route(
    router,
    { method: 'delete', path: '/api/session', action: 'session.signOut' },
    async ({ request, response }) => {
      const { id } = request.session;
      await leaveSession(request);
      response.clearCookie('lampyrid.sid', { path: '/' });
      hub.revoke({ sessionId: id });
    },
  );
  route(router, { method: 'get', path: '/api/sessions', action: 'session.list' }, ({ caller }) =>
    listSessions(db, caller.userId, caller.sessionId),
  );
  route(
    router,
    { method: 'delete', path: '/api/sessions/:id', action: 'session.revoke' },
    async ({ caller, param }) => {
      const sessionId = await endSession(db, caller.userId, param('id'));
      if (!sessionId) throw notFound('sign-in');
      hub.revoke({ sessionId });
      await audit(db, { caller, action: 'session.revoke' });
    },
  );
}

function setUpRoutes(router: Router, context: RouteContext): void {
  route(
    router,
    { method: 'post', path: '/api/setup', action: 'setup.finish', body: setUpSchema, status: 201 },
    async (ask) => {
      const { token, demo, ...lead } = ask.body;
      const { userId, crewId } = await finishSetUp(context.db, token, lead);
      await beginSession(ask.request, userId);
      await audit(context.db, { userId, crewId, action: 'setup.finish' });
      if (demo) context.demo.make(crewId, userId);
      return sessionAnswer(context, ask);
    },
  );
}

function passwordRoutes(router: Router, context: RouteContext): void {
  const { db, mail, log, hub } = context;
  route(
    router,
    { method: 'post', path: '/api/password/forgot', action: 'password.forgot', body: forgotSchema },
    ({ body, request }) => {
      const send = async () => {
        const made = await forgetPassword(db, body.email);
        if (!made) return;
        const url = `${originOf(context, request.headers.origin)}/reset#${made.token}`;
        await mail.send(passwordLetter(body.email, { name: made.name, url }));
      };
      // Not waited for: the time it takes would tell whether the address is known.
      void send().catch((error: unknown) => log.warn({ err: error }, 'a password letter did not leave'));
    },
  );
  route(
    router,
    { method: 'post', path: '/api/password/reset', action: 'password.reset', body: resetSchema },
    async ({ body }) => {
      const userId = await resetPassword(db, body.token, body.password);
      await endOtherSessions(db, userId, null);
      hub.revoke({ userId });
      await audit(db, { userId, action: 'password.reset' });
    },
  );
  route(
    router,
    { method: 'post', path: '/api/password/change', action: 'password.change', body: changePasswordSchema },
    async ({ body, caller }) => {
      await changePassword(db, caller.userId, body.old, body.password);
      const ended = await endOtherSessions(db, caller.userId, caller.sessionId);
      for (const sessionId of ended) hub.revoke({ sessionId });
      await audit(db, { caller, action: 'password.change' });
    },
  );
}

/** Address for links in letters: the one the page itself was opened by, which the guard has checked. */
const originOf = ({ config }: RouteContext, origin: string | undefined): string =>
  config.publicUrl?.replace(/\/$/, '') ?? origin ?? '';

function invitationRoutes(router: Router, context: RouteContext): void {
  const { db, mail, log } = context;
  route(
    router,
    { method: 'post', path: '/api/invitations', action: 'invitation.make', body: inviteSchema, status: 201 },
    async ({ body, caller, request }) => {
      const { invitation, token, crewName } = await invite(db, caller, body);
      const url = `${originOf(context, request.headers.origin)}/invite#${token}`;
      const letter = invitationLetter(body.email, { crewName, by: caller.name, role: body.role, url });
      try {
        await mail.send(letter);
      } catch (error) {
        log.warn({ err: error }, 'an invitation did not leave');
        await revokeInvitation(db, caller.crewId, invitation.id);
        throw new Fault(
          502,
          `The mail server did not take the letter to ${body.email}, so nobody is invited.`,
          'Check the address, or ask whoever runs Lampyrid to check SMTP_URL, and invite again.',
        );
      }
      await audit(db, { caller, action: 'invitation.make', object: body.email });
      return invitation;
    },
  );
  route(
    router,
    { method: 'delete', path: '/api/invitations/:id', action: 'invitation.revoke' },
    async ({ caller, param }) => {
      await revokeInvitation(db, caller.crewId, param('id'));
      await audit(db, { caller, action: 'invitation.revoke', object: param('id') });
    },
  );
  route(
    router,
    { method: 'post', path: '/api/invitations/read', action: 'invitation.read', body: readInvitationSchema },
    ({ body }) => readInvitation(db, body.token),
  );
  route(
    router,
    {
      method: 'post',
      path: '/api/invitations/accept',
      action: 'invitation.accept',
      body: acceptSchema,
      status: 201,
    },
    async (ask) => {
      const userId = await acceptInvitation(db, ask.body);
      await beginSession(ask.request, userId);
      await audit(db, { userId, action: 'invitation.accept' });
      return sessionAnswer(context, ask);
    },
  );
}

function memberRoutes(router: Router, { db, hub }: RouteContext): void {
  route(router, { method: 'get', path: '/api/crew', action: 'crew.read' }, ({ caller }) =>
    readCrew(db, caller.crewId),
  );
  route(
    router,
    { method: 'patch', path: '/api/members/:id', action: 'crew.changeRole', body: changeRoleSchema },
    async ({ caller, param, body }) => {
      await changeRole(db, caller.crewId, param('id'), body.role);
      // Their pages join again at once, as what they are now.
      hub.revoke({ userId: param('id') });
      await audit(db, { caller, action: 'crew.changeRole', object: `${param('id')} ${body.role}` });
      return readCrew(db, caller.crewId);
    },
  );
  route(
    router,
    { method: 'delete', path: '/api/members/:id', action: 'crew.remove' },
    async ({ caller, param }) => {
      await removeMember(db, caller.crewId, param('id'));
      hub.revoke({ userId: param('id') });
      await audit(db, { caller, action: 'crew.remove', object: param('id') });
    },
  );
}

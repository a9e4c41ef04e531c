import { displayCookieName } from '#server/services/displays/tokenInCookie';

const lifeS = 90 * 24 * 3600;

/** The cookie that makes a browser a display: not readable by scripts, sent to our own pages only. */
export const displayCookie = (token: string, secure: boolean): string =>
  `${displayCookieName}=${token}; Path=/; Max-Age=${lifeS}; HttpOnly; SameSite=Lax${secure ? '; Secure' : ''}`;

export const displayCookieName = 'lampyrid.display';

/** The device token in a Cookie header; null when there is none. */
export function tokenInCookie(header: string | undefined): string | null {
  for (const part of (header ?? '').split(';')) {
    const [name, value] = part.trim().split('=');
    if (name === displayCookieName && value && /^[A-Za-z0-9_-]{20,128}$/.test(value)) return value;
  }
  return null;
}

/** The one-time token after `#` in an address: it stays in the browser and is in no server log. */
export const hashToken = (): string => decodeURIComponent(window.location.hash.slice(1));

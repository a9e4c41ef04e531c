/** Raised when an older page can no longer talk to the hub; the page then reloads when the show is not live. */
export const protocolVersion = 1;

/** Close codes of the hub, from the range that RFC 6455 leaves to applications. */
export const closeCodes = {
  badMessage: 4400,
  notAllowed: 4403,
  gone: 4404,
  tooSlow: 4408,
  versionMismatch: 4426,
  tooMany: 4429,
  shuttingDown: 4503,
} as const;

/** Times of the link, in ms. */
export const linkTimes = {
  /** The hub says something at least this often. */
  heartbeat: 1000,
  /** A page that heard nothing this long calls the link dead. */
  silence: 2500,
  /** The hub cuts a socket that sent nothing this long (pages send `time` each second). */
  idle: 5000,
  /** First valid `hello` after the upgrade. */
  hello: 5000,
  /** Default life of a command. */
  expiry: 2000,
} as const;

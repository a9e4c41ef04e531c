import type { Role } from '#shared/show/roles';

/** A signed-in member of a crew. */
export interface Caller {
  userId: string;
  crewId: string;
  role: Role;
  name: string;
  email: string;
  /** Name of the session in the table `session`. */
  sessionId: string;
}

/** A joined display, known by its device token. */
export interface DisplayCaller {
  displayId: string;
  showId: string;
  crewId: string;
}

import type { Config } from '#server/config';
import type { Mailer } from '#server/mail/mailer';
import type { Database } from '#server/models/database';
import type { DemoCalls } from '#server/services/demoCalls';
import type { HubCalls } from '#server/services/hubCalls';
import type { Log } from '#server/services/log';
import type { MediaCalls } from '#server/services/mediaCalls';

/** What routers are given. */
export interface RouteContext {
  config: Config;
  db: Database;
  hub: HubCalls;
  mail: Mailer;
  media: MediaCalls;
  demo: DemoCalls;
  log: Log;
}

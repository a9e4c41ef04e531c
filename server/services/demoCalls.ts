import type { DemoProgress } from '#shared/api/demo';

/** The making of the demo night, as routes see it. */
export interface DemoCalls {
  /** Starts it for a crew unless it is being made or there; answers at once. */
  make: (crewId: string, userId: string | null) => DemoProgress;
  progress: (crewId: string) => Promise<DemoProgress>;
}

import { migrate } from '#server/models/migrate';
import { makeTemplate } from '#tests/make/templateDatabase';

/** Runs once before all tests; what it returns runs once after them. */
export async function setup(): Promise<() => Promise<void>> {
  return makeTemplate(migrate);
}

import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { makeTemplate } from './make/templateDatabase';

/** Runs once before all tests; what it returns runs once after them. */
export async function setup(): Promise<() => Promise<void>> {
  const path = fileURLToPath(new URL('../server/models/migrate.ts', import.meta.url));
  if (!existsSync(path)) return makeTemplate(async () => undefined);
  const { migrate } = (await import(path)) as { migrate: (url: string) => Promise<void> };
  return makeTemplate(migrate);
}

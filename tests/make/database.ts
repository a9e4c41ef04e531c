import pg from 'pg';

export interface FreshDatabase {
  /** Address of a migrated, empty database that nobody else uses. */
  url: string;
  /** Takes it away, whoever is still connected. */
  drop: () => Promise<void>;
}

let made = 0;

/** A copy of the migrated template. Call `drop` when done. */
export async function freshDatabase(): Promise<FreshDatabase> {
  const admin = process.env.LAMPYRID_TEST_ADMIN;
  const template = process.env.LAMPYRID_TEST_TEMPLATE;
  if (!admin || !template) throw new Error('No template database: tests/globalSetup.ts did not run.');
  made += 1;
  const name = `fresh_${process.pid}_${process.hrtime.bigint().toString(36)}_${made}`;
  await createDatabase(admin, name, template);
  return { url: withDatabase(admin, name), drop: () => dropDatabase(admin, name) };
}

/** The same server's address with another database in it. */
export function withDatabase(url: string, name: string): string {
  const address = new URL(url);
  address.pathname = `/${name}`;
  return address.href;
}

/** Makes an empty database, or a copy of `template`. Names are ours: lower-case letters, digits and underscores. */
export async function createDatabase(admin: string, name: string, template = 'template0'): Promise<void> {
  await perform(admin, `CREATE DATABASE ${name} TEMPLATE ${template}`);
}

/** Takes a database away and ends the connections that it still has. */
export async function dropDatabase(admin: string, name: string): Promise<void> {
  await perform(admin, `DROP DATABASE IF EXISTS ${name} WITH (FORCE)`);
}

async function perform(url: string, sql: string): Promise<void> {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    await client.query(sql);
  } finally {
    await client.end();
  }
}

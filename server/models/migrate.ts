import pg from 'pg';
import { type QueryInterface, Sequelize } from 'sequelize';
import { SequelizeStorage, Umzug } from 'umzug';
import { up as house } from '#server/migrations/0001-house';

type Up = (query: QueryInterface) => Promise<void>;

/** Forward only, in this order; a name that has run is never edited or renamed. */
const migrations: readonly { name: string; up: Up }[] = [{ name: '0001-house', up: house }];

/** Any number of our own: two starts at once take turns. */
const lockKey = 7_226_417;

/**
 * Brings a database up to date. Safe when two programs call it at once, and when nothing is to be done.
 * @throws when the database can't be reached or a migration fails; that migration is then undone
 */
export async function migrate(databaseUrl: string): Promise<void> {
  const guard = new pg.Client({ connectionString: databaseUrl, connectionTimeoutMillis: 5000 });
  guard.on('error', () => undefined);
  await guard.connect();
  const sequelize = new Sequelize(databaseUrl, { logging: false, pool: { max: 2 } });
  try {
    await guard.query('select pg_advisory_lock($1)', [lockKey]);
    await umzugOf(sequelize).up();
  } finally {
    await sequelize.close();
    await guard.end();
  }
}

function umzugOf(sequelize: Sequelize) {
  return new Umzug({
    migrations: migrations.map(({ name, up }) => ({
      name,
      // The pg driver runs several statements sent as one text in one transaction of their own.
      up: () => up(sequelize.getQueryInterface()),
    })),
    storage: new SequelizeStorage({ sequelize, tableName: 'migrations' }),
    logger: undefined,
  });
}

import pg from 'pg';
import { type Model, type ModelAttributes, type ModelStatic, Sequelize } from 'sequelize';
import { AsRunRow, asRunColumns } from './asRun';
import { Asset, assetColumns } from './asset';
import { AuditEntry, auditEntryColumns } from './auditEntry';
import { Brand, brandColumns } from './brand';
import { Crew, crewColumns } from './crew';
import { Display, displayColumns } from './display';
import { Invitation, invitationColumns } from './invitation';
import { Link, linkColumns } from './link';
import { Membership, membershipColumns } from './membership';
import { OutputMapVersion, outputMapColumns } from './outputMap';
import { PairingCode, pairingCodeColumns } from './pairingCode';
import { Phase, phaseColumns } from './phase';
import { Scene, sceneColumns } from './scene';
import { SceneVersion, sceneVersionColumns } from './sceneVersion';
import { Show, showColumns } from './show';
import { ShowEpoch, showEpochColumns } from './showEpoch';
import { ShowEventRow, showEventColumns } from './showEvent';
import { Snapshot, snapshotColumns } from './snapshot';
import { User, userColumns } from './user';
import { Venue, venueColumns } from './venue';

/** Limits on every connection: a frozen database answers with an error in 3 s, never with silence. Times in ms. */
export const connectionLimits = {
  connectionTimeoutMillis: 1000,
  query_timeout: 3000,
  statement_timeout: 2500,
  idleTimeoutMillis: 10_000,
  keepAlive: true,
} as const;

function modelsOf(sequelize: Sequelize) {
  /** A class of its own for each connection, so that two databases in one process stay apart. */
  const bind = <M extends Model>(base: ModelStatic<M>, tableName: string, columns: ModelAttributes<M>) => {
    const Bound = class extends (base as ModelStatic<Model>) {};
    Object.defineProperty(Bound, 'name', { value: base.name });
    Bound.init(columns as ModelAttributes<Model>, {
      sequelize,
      tableName,
      modelName: base.name,
      underscored: true,
      timestamps: false,
    });
    return Bound as unknown as ModelStatic<M>;
  };
  return {
    crews: bind(Crew, 'crews', crewColumns),
    users: bind(User, 'users', userColumns),
    memberships: bind(Membership, 'memberships', membershipColumns),
    invitations: bind(Invitation, 'invitations', invitationColumns),
    links: bind(Link, 'links', linkColumns),
    venues: bind(Venue, 'venues', venueColumns),
    shows: bind(Show, 'shows', showColumns),
    phases: bind(Phase, 'phases', phaseColumns),
    brands: bind(Brand, 'brands', brandColumns),
    assets: bind(Asset, 'assets', assetColumns),
    scenes: bind(Scene, 'scenes', sceneColumns),
    sceneVersions: bind(SceneVersion, 'scene_versions', sceneVersionColumns),
    displays: bind(Display, 'displays', displayColumns),
    outputMaps: bind(OutputMapVersion, 'output_maps', outputMapColumns),
    pairingCodes: bind(PairingCode, 'pairing_codes', pairingCodeColumns),
    auditEntries: bind(AuditEntry, 'audit_log', auditEntryColumns),
    showEpochs: bind(ShowEpoch, 'show_epochs', showEpochColumns),
    showEvents: bind(ShowEventRow, 'show_events', showEventColumns),
    snapshots: bind(Snapshot, 'snapshots', snapshotColumns),
    asRun: bind(AsRunRow, 'as_run', asRunColumns),
  };
}

/** All tables of one database. */
export type Models = ReturnType<typeof modelsOf>;

export interface Database extends Models {
  sequelize: Sequelize;
  /** Plain connections beside Sequelize: sessions and whatever writes rows by hand. */
  pool: pg.Pool;
  /** Ends every connection. Call before the server itself is stopped. */
  close: () => Promise<void>;
}

/**
 * A pool whose faults never end the process: a broken connection, idle or in use, is only an event.
 * @param max most connections at once
 */
export function makePool(url: string, max: number): pg.Pool {
  const pool = new pg.Pool({ connectionString: url, max, ...connectionLimits });
  pool.on('error', () => undefined);
  pool.on('connect', (client) => client.on('error', () => undefined));
  return pool;
}

/** Opens a database that has been migrated. Connects when first asked; a failing query rejects, nothing hangs. */
export function connect(url: string): Database {
  const { idleTimeoutMillis, ...dialectOptions } = connectionLimits;
  const sequelize = new Sequelize(url, {
    logging: false,
    dialectOptions,
    pool: { max: 6, acquire: 3000, idle: idleTimeoutMillis },
  });
  const pool = makePool(url, 4);
  return {
    ...modelsOf(sequelize),
    sequelize,
    pool,
    close: async () => {
      await sequelize.close();
      await pool.end();
    },
  };
}

import { type InferAttributes, type InferCreationAttributes, Model, type ModelAttributes } from 'sequelize';
import type { RoomKind, ShowState } from '#shared/show/state';
import { json, key, part, text, whole } from './columns';

/** A room’s state after an event. */
export class Snapshot extends Model<InferAttributes<Snapshot>, InferCreationAttributes<Snapshot>> {
  declare showId: string;
  declare room: RoomKind;
  declare epoch: number;
  declare revision: number;
  declare state: ShowState;
}

/** Columns of the table `snapshots`. */
export const snapshotColumns: ModelAttributes<Snapshot> = {
  showId: key(),
  room: part(text()),
  epoch: part(whole()),
  revision: part(whole()),
  state: json(),
};

import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import { json, key, now, or, text, time, whole } from './columns';

/** A browser page that feeds one projector or panel. Only the hash of its device token is kept. */
export class Display extends Model<InferAttributes<Display>, InferCreationAttributes<Display>> {
  declare id: string;
  declare showId: string;
  declare name: string;
  declare tokenHash: CreationOptional<string | null>;
  declare raster: CreationOptional<[number, number] | null>;
  declare mapVersion: CreationOptional<number>;
  declare joinedBy: CreationOptional<string | null>;
  declare joinedAt: CreationOptional<Date>;
  declare lastSeenAt: CreationOptional<Date | null>;
}

/** Columns of the table `displays`. */
export const displayColumns: ModelAttributes<Display> = {
  id: key(),
  showId: text(),
  name: text(),
  tokenHash: or(text(), null),
  raster: or(json(), null),
  mapVersion: or(whole(), 0),
  joinedBy: or(text(), null),
  joinedAt: now(),
  lastSeenAt: or(time(), null),
};

import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import { json, key, now, or, text, time, whole } from './columns';

/** A display that waits to be joined. Only the hash of its secret is kept. */
export class PairingCode extends Model<InferAttributes<PairingCode>, InferCreationAttributes<PairingCode>> {
  declare code: string;
  declare secretHash: string;
  declare raster: [number, number];
  declare address: string;
  declare browser: CreationOptional<string>;
  declare intervalMs: number;
  declare polledAt: CreationOptional<Date | null>;
  declare displayId: CreationOptional<string | null>;
  declare expiresAt: Date;
  declare createdAt: CreationOptional<Date>;
}

/** Columns of the table `pairing_codes`. */
export const pairingCodeColumns: ModelAttributes<PairingCode> = {
  code: key(),
  secretHash: text(),
  raster: json(),
  address: text(),
  browser: or(text(), ''),
  intervalMs: whole(),
  polledAt: or(time(), null),
  displayId: or(text(), null),
  expiresAt: time(),
  createdAt: now(),
};

import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import type { assetStates } from '#shared/api/assets';
import { json, key, now, number, or, text, whole } from './columns';

/** An uploaded file and what became of it. `file` and `posterFile` are names in the media folder. */
export class Asset extends Model<InferAttributes<Asset>, InferCreationAttributes<Asset>> {
  declare id: string;
  declare crewId: string;
  declare name: string;
  declare originalName: CreationOptional<string>;
  declare kind: 'clip' | 'still' | 'mark';
  declare state: (typeof assetStates)[number];
  declare progress: CreationOptional<number>;
  declare fault: CreationOptional<string | null>;
  declare hash: CreationOptional<string>;
  declare bytes: CreationOptional<number>;
  declare width: CreationOptional<number | null>;
  declare height: CreationOptional<number | null>;
  declare durationS: CreationOptional<number | null>;
  declare fps: CreationOptional<number | null>;
  declare codec: CreationOptional<Record<string, unknown> | null>;
  declare file: CreationOptional<string | null>;
  declare posterFile: CreationOptional<string | null>;
  declare addedBy: CreationOptional<string | null>;
  declare addedAt: CreationOptional<Date>;
}

/** Columns of the table `assets`. */
export const assetColumns: ModelAttributes<Asset> = {
  id: key(),
  crewId: text(),
  name: text(),
  originalName: or(text(), ''),
  kind: text(),
  state: text(),
  progress: or(number(), 0),
  fault: or(text(), null),
  hash: or(text(), ''),
  bytes: or(number(), 0),
  width: or(whole(), null),
  height: or(whole(), null),
  durationS: or(number(), null),
  fps: or(number(), null),
  codec: or(json(), null),
  file: or(text(), null),
  posterFile: or(text(), null),
  addedBy: or(text(), null),
  addedAt: now(),
};

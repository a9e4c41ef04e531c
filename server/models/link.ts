import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import { key, now, or, text, time } from './columns';

/** A one-time link by purpose: `setup`, `password`. Only the hash of its token is kept. */
export class Link extends Model<InferAttributes<Link>, InferCreationAttributes<Link>> {
  declare tokenHash: string;
  declare purpose: string;
  declare object: CreationOptional<string | null>;
  declare expiresAt: CreationOptional<Date | null>;
  declare usedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

/** Columns of the table `links`. */
export const linkColumns: ModelAttributes<Link> = {
  tokenHash: key(),
  purpose: text(),
  object: or(text(), null),
  expiresAt: or(time(), null),
  usedAt: or(time(), null),
  createdAt: now(),
};

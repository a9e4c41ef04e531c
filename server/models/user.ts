import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import { key, now, or, text, time } from './columns';

/** An account. Its role is in memberships. */
export class User extends Model<InferAttributes<User>, InferCreationAttributes<User>> {
  declare id: string;
  declare name: string;
  declare email: string;
  declare passwordHash: string;
  declare lastSignInAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

/** Columns of the table `users`. */
export const userColumns: ModelAttributes<User> = {
  id: key(),
  name: text(),
  email: text(),
  passwordHash: text(),
  lastSignInAt: or(time(), null),
  createdAt: now(),
};

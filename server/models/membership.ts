import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import type { Role } from '#shared/show/roles';
import { key, now, text } from './columns';

/** Who is in which crew, as what. A user is in one crew at most. */
export class Membership extends Model<InferAttributes<Membership>, InferCreationAttributes<Membership>> {
  declare userId: string;
  declare crewId: string;
  declare role: Role;
  declare createdAt: CreationOptional<Date>;
}

/** Columns of the table `memberships`. */
export const membershipColumns: ModelAttributes<Membership> = {
  userId: key(),
  crewId: text(),
  role: text(),
  createdAt: now(),
};

import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import type { Role } from '#shared/show/roles';
import { key, now, or, text, time } from './columns';

/** A mailed offer to join a crew. Only the hash of its token is kept. */
export class Invitation extends Model<InferAttributes<Invitation>, InferCreationAttributes<Invitation>> {
  declare id: string;
  declare crewId: string;
  declare email: string;
  declare role: Role;
  declare tokenHash: string;
  declare invitedBy: CreationOptional<string | null>;
  declare expiresAt: Date;
  declare acceptedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

/** Columns of the table `invitations`. */
export const invitationColumns: ModelAttributes<Invitation> = {
  id: key(),
  crewId: text(),
  email: text(),
  role: text(),
  tokenHash: text(),
  invitedBy: or(text(), null),
  expiresAt: time(),
  acceptedAt: or(time(), null),
  createdAt: now(),
};

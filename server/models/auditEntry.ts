import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import { now, or, text } from './columns';

/** Who did what to which object, from where, and how it went. */
export class AuditEntry extends Model<InferAttributes<AuditEntry>, InferCreationAttributes<AuditEntry>> {
  declare id: CreationOptional<string>;
  declare at: CreationOptional<Date>;
  declare crewId: CreationOptional<string | null>;
  declare userId: CreationOptional<string | null>;
  declare action: string;
  declare object: CreationOptional<string | null>;
  declare device: CreationOptional<string | null>;
  declare result: string;
}

/** Columns of the table `audit_log`. */
export const auditEntryColumns: ModelAttributes<AuditEntry> = {
  id: { type: DataTypes.BIGINT, primaryKey: true, autoIncrement: true },
  at: now(),
  crewId: or(text(), null),
  userId: or(text(), null),
  action: text(),
  object: or(text(), null),
  device: or(text(), null),
  result: text(),
};

import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import { key, now, text } from './columns';

/** A team that owns shows, venues and media. */
export class Crew extends Model<InferAttributes<Crew>, InferCreationAttributes<Crew>> {
  declare id: string;
  declare name: string;
  declare createdAt: CreationOptional<Date>;
}

/** Columns of the table `crews`. */
export const crewColumns: ModelAttributes<Crew> = {
  id: key(),
  name: text(),
  createdAt: now(),
};

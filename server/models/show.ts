import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import { key, now, number, or, text, time } from './columns';

/** One dated night. */
export class Show extends Model<InferAttributes<Show>, InferCreationAttributes<Show>> {
  declare id: string;
  declare crewId: string;
  declare name: string;
  declare date: string;
  declare mode: CreationOptional<'plan' | 'live' | 'closed'>;
  declare venueId: CreationOptional<string | null>;
  declare brandId: CreationOptional<string | null>;
  declare client: CreationOptional<string>;
  declare pictureDelayMs: CreationOptional<number>;
  declare openedAt: CreationOptional<Date | null>;
  declare closedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

/** Columns of the table `shows`. */
export const showColumns: ModelAttributes<Show> = {
  id: key(),
  crewId: text(),
  name: text(),
  date: { type: DataTypes.DATEONLY },
  mode: or(text(), 'plan'),
  venueId: or(text(), null),
  brandId: or(text(), null),
  client: or(text(), ''),
  pictureDelayMs: or(number(), 0),
  openedAt: or(time(), null),
  closedAt: or(time(), null),
  createdAt: now(),
};

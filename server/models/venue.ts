import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import type { VenueBody } from '#shared/venue/schema';
import { json, key, now, text } from './columns';

/** A measured room. */
export class Venue extends Model<InferAttributes<Venue>, InferCreationAttributes<Venue>> {
  declare id: string;
  declare crewId: string;
  declare name: string;
  declare body: VenueBody;
  declare createdAt: CreationOptional<Date>;
}

/** Columns of the table `venues`. */
export const venueColumns: ModelAttributes<Venue> = {
  id: key(),
  crewId: text(),
  name: text(),
  body: json(),
  createdAt: now(),
};

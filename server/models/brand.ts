import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import { json, key, now, or, text } from './columns';

/** A client’s name, colours and mark. */
export class Brand extends Model<InferAttributes<Brand>, InferCreationAttributes<Brand>> {
  declare id: string;
  declare crewId: string;
  declare name: string;
  declare palette: CreationOptional<string[]>;
  declare markAssetId: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
}

/** Columns of the table `brands`. */
export const brandColumns: ModelAttributes<Brand> = {
  id: key(),
  crewId: text(),
  name: text(),
  palette: or(json(), []),
  markAssetId: or(text(), null),
  createdAt: now(),
};

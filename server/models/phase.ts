import { type InferAttributes, type InferCreationAttributes, Model, type ModelAttributes } from 'sequelize';
import { key, number, text, whole } from './columns';

/** A part of a night. */
export class Phase extends Model<InferAttributes<Phase>, InferCreationAttributes<Phase>> {
  declare id: string;
  declare showId: string;
  declare name: string;
  declare colour: string;
  declare startsAt: string;
  declare energy: number;
  declare brightness: number;
  declare flashes: number;
  declare position: number;
}

/** Columns of the table `phases`. */
export const phaseColumns: ModelAttributes<Phase> = {
  id: key(),
  showId: text(),
  name: text(),
  colour: text(),
  startsAt: text(),
  energy: whole(),
  brightness: number(),
  flashes: number(),
  position: whole(),
};

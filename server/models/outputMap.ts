import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import type { OutputMap } from '#shared/mapping/schema';
import { json, key, now, or, part, text, whole } from './columns';

/** One saved version of what a display puts where. */
export class OutputMapVersion extends Model<
  InferAttributes<OutputMapVersion>,
  InferCreationAttributes<OutputMapVersion>
> {
  declare displayId: string;
  declare version: number;
  declare map: OutputMap;
  declare note: CreationOptional<string>;
  declare by: CreationOptional<string | null>;
  declare at: CreationOptional<Date>;
}

/** Columns of the table `output_maps`. */
export const outputMapColumns: ModelAttributes<OutputMapVersion> = {
  displayId: key(),
  version: part(whole()),
  map: json(),
  note: or(text(), ''),
  by: or(text(), null),
  at: now(),
};

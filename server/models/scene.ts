import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import { key, now, or, text, time, whole } from './columns';

/** What a screen shows; the body is in scene_versions under `version`. */
export class Scene extends Model<InferAttributes<Scene>, InferCreationAttributes<Scene>> {
  declare id: string;
  declare showId: string;
  declare name: string;
  declare phaseId: CreationOptional<string | null>;
  declare energy: number;
  declare position: number;
  declare version: number;
  declare deletedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

/** Columns of the table `scenes`. */
export const sceneColumns: ModelAttributes<Scene> = {
  id: key(),
  showId: text(),
  name: text(),
  phaseId: or(text(), null),
  energy: whole(),
  position: whole(),
  version: whole(),
  deletedAt: or(time(), null),
  createdAt: now(),
};

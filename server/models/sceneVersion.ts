import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import type { SceneBody } from '#shared/scene/schema';
import { json, key, now, or, part, text, whole } from './columns';

/** One saved body of a scene. Never changed, so that a past night can be drawn again. */
export class SceneVersion extends Model<
  InferAttributes<SceneVersion>,
  InferCreationAttributes<SceneVersion>
> {
  declare sceneId: string;
  declare version: number;
  declare body: SceneBody;
  declare by: CreationOptional<string | null>;
  declare at: CreationOptional<Date>;
}

/** Columns of the table `scene_versions`. */
export const sceneVersionColumns: ModelAttributes<SceneVersion> = {
  sceneId: key(),
  version: part(whole()),
  body: json(),
  by: or(text(), null),
  at: now(),
};

import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import type { RoomKind } from '#shared/show/state';
import { key, number, or, part, text, whole } from './columns';

/** A run that a display has drawn on a screen. The same report twice is one row. */
export class AsRunRow extends Model<InferAttributes<AsRunRow>, InferCreationAttributes<AsRunRow>> {
  declare showId: string;
  declare room: RoomKind;
  declare displayId: string;
  declare seq: number;
  declare screenId: string;
  declare runId: CreationOptional<string | null>;
  declare sceneId: CreationOptional<string | null>;
  declare sceneVersion: CreationOptional<number | null>;
  declare at: number;
  declare lateMs: number;
}

/** Columns of the table `as_run`. */
export const asRunColumns: ModelAttributes<AsRunRow> = {
  showId: key(),
  room: part(text()),
  displayId: part(text()),
  seq: part(whole()),
  screenId: text(),
  runId: or(text(), null),
  sceneId: or(text(), null),
  sceneVersion: or(whole(), null),
  at: part(number()),
  lateMs: number(),
};

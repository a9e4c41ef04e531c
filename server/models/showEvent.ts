import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type ModelAttributes,
} from 'sequelize';
import type { EventBody } from '#shared/show/events';
import type { RoomKind } from '#shared/show/state';
import { json, key, number, or, part, text, whole } from './columns';

/** One event of a room, in hub order. */
export class ShowEventRow extends Model<
  InferAttributes<ShowEventRow>,
  InferCreationAttributes<ShowEventRow>
> {
  declare showId: string;
  declare room: RoomKind;
  declare epoch: number;
  declare revision: number;
  declare at: number;
  declare commandId: CreationOptional<string | null>;
  declare by: CreationOptional<string | null>;
  declare body: EventBody;
}

/** Columns of the table `show_events`. */
export const showEventColumns: ModelAttributes<ShowEventRow> = {
  showId: key(),
  room: part(text()),
  epoch: part(whole()),
  revision: part(whole()),
  at: number(),
  commandId: or(text(), null),
  by: or(text(), null),
  body: json(),
};

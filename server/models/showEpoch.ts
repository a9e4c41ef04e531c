import { type InferAttributes, type InferCreationAttributes, Model, type ModelAttributes } from 'sequelize';
import type { RoomKind } from '#shared/show/state';
import { key, part, text, whole } from './columns';

/** The newest epoch of a room: raised each time a hub takes the room over. */
export class ShowEpoch extends Model<InferAttributes<ShowEpoch>, InferCreationAttributes<ShowEpoch>> {
  declare showId: string;
  declare room: RoomKind;
  declare epoch: number;
}

/** Columns of the table `show_epochs`. */
export const showEpochColumns: ModelAttributes<ShowEpoch> = {
  showId: key(),
  room: part(text()),
  epoch: whole(),
};

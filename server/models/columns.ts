import { DataTypes, type ModelAttributeColumnOptions } from 'sequelize';

/** Columns that many tables have, so that each is written once. Fresh objects: Sequelize writes into them. */
export const key = (): ModelAttributeColumnOptions => ({ type: DataTypes.TEXT, primaryKey: true });
export const text = (): ModelAttributeColumnOptions => ({ type: DataTypes.TEXT });
export const whole = (): ModelAttributeColumnOptions => ({ type: DataTypes.INTEGER });
export const number = (): ModelAttributeColumnOptions => ({ type: DataTypes.DOUBLE });
export const json = (): ModelAttributeColumnOptions => ({ type: DataTypes.JSONB });
export const time = (): ModelAttributeColumnOptions => ({ type: DataTypes.DATE });
/** Time of the insert unless given. */
export const now = (): ModelAttributeColumnOptions => ({ type: DataTypes.DATE, defaultValue: DataTypes.NOW });
/** Part of a composite key. */
export const part = (column: ModelAttributeColumnOptions): ModelAttributeColumnOptions => ({
  ...column,
  primaryKey: true,
});
/** Given by the database or this value when left out. */
export const or = (
  column: ModelAttributeColumnOptions,
  defaultValue: unknown,
): ModelAttributeColumnOptions => ({ ...column, defaultValue });

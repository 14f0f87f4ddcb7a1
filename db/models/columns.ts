import { DataTypes, type ModelAttributeColumnOptions } from 'sequelize';

/** A primary key that the application makes (`newId`). */
export function idColumn(): ModelAttributeColumnOptions {
  return { type: DataTypes.CHAR(20), primaryKey: true, allowNull: false };
}

export function idReference(allowNull = false): ModelAttributeColumnOptions {
  return { type: DataTypes.CHAR(20), allowNull };
}

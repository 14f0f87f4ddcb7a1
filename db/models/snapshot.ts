import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from 'sequelize';
import { idColumn, idReference } from './columns';

/** A frozen copy of a sheet. It is written once; nothing in this project changes or removes one. */
export class Snapshot extends Model<InferAttributes<Snapshot>, InferCreationAttributes<Snapshot>> {
  declare id: string;
  declare sheetId: string;
  declare number: number;
  declare name: string;
  declare document: string;
  /** SHA-256 of `document`: held against it at every reading, so that a change outside this project is noticed. */
  declare documentHash: string;
  declare revision: number;
  declare takenAt: Date;
  declare takenBy: string;
}

export function initSnapshot(sequelize: Sequelize): void {
  Snapshot.init(
    {
      id: idColumn(),
      sheetId: idReference(),
      number: { type: DataTypes.INTEGER, allowNull: false },
      name: { type: DataTypes.STRING(120), allowNull: false },
      document: { type: DataTypes.TEXT('long'), allowNull: false },
      documentHash: { type: DataTypes.CHAR(64), allowNull: false },
      revision: { type: DataTypes.INTEGER, allowNull: false },
      takenAt: { type: DataTypes.DATE(3), allowNull: false },
      takenBy: idReference(),
    },
    { sequelize, modelName: 'Snapshot', tableName: 'snapshots' },
  );
}

import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from 'sequelize';
import { idColumn, idReference } from './columns';

/** A sheet as it stands. `purpose` and `partCount` repeat what is in the document, for the list. */
export class Sheet extends Model<InferAttributes<Sheet>, InferCreationAttributes<Sheet>> {
  declare id: string;
  declare teamId: string;
  declare name: string;
  /** The document as text; written and read only through `stored-document`. */
  declare document: string;
  /** SHA-256 of `document`, in hexadecimal: tells equal documents without reading them. */
  declare documentHash: string;
  declare purpose: string;
  declare partCount: number;
  /** Counts the saves, from 1. */
  declare revision: CreationOptional<number>;
  declare createdAt: Date;
  declare createdBy: string;
  declare changedAt: Date;
  declare changedBy: string;
  declare archivedAt: CreationOptional<Date | null>;
  declare archivedBy: CreationOptional<string | null>;
  /** Where a clone came from, with the names of that time. */
  declare originSheetId: CreationOptional<string | null>;
  declare originSheetName: CreationOptional<string | null>;
  declare originSnapshotId: CreationOptional<string | null>;
  declare originSnapshotName: CreationOptional<string | null>;
  declare originRevision: CreationOptional<number | null>;
  /** The highest number given so far, on this sheet. */
  declare lastSnapshotNumber: CreationOptional<number>;
  declare lastNoteNumber: CreationOptional<number>;
  /** Counts the changes to this sheet's notes: an open browser asks whether it has moved. */
  declare notesVersion: CreationOptional<number>;
}

export function initSheet(sequelize: Sequelize): void {
  Sheet.init(
    {
      id: idColumn(),
      teamId: idReference(),
      name: { type: DataTypes.STRING(120), allowNull: false },
      document: { type: DataTypes.TEXT('long'), allowNull: false },
      documentHash: { type: DataTypes.CHAR(64), allowNull: false },
      purpose: { type: DataTypes.STRING(2000), allowNull: false },
      partCount: { type: DataTypes.INTEGER, allowNull: false },
      revision: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
      createdAt: { type: DataTypes.DATE(3), allowNull: false },
      createdBy: idReference(),
      changedAt: { type: DataTypes.DATE(3), allowNull: false },
      changedBy: idReference(),
      archivedAt: { type: DataTypes.DATE(3), allowNull: true, defaultValue: null },
      archivedBy: { ...idReference(true), defaultValue: null },
      originSheetId: { ...idReference(true), defaultValue: null },
      originSheetName: { type: DataTypes.STRING(120), allowNull: true, defaultValue: null },
      originSnapshotId: { ...idReference(true), defaultValue: null },
      originSnapshotName: { type: DataTypes.STRING(120), allowNull: true, defaultValue: null },
      originRevision: { type: DataTypes.INTEGER, allowNull: true, defaultValue: null },
      lastSnapshotNumber: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
      lastNoteNumber: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
      notesVersion: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    },
    { sequelize, modelName: 'Sheet', tableName: 'sheets' },
  );
}

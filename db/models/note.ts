import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from 'sequelize';
import { NOTE_CLASSES, type NoteClass } from '@/canvas/document/notes';
import { idColumn, idReference } from './columns';

/** The first entry of a thread that is pinned to a sheet. */
export class Note extends Model<InferAttributes<Note>, InferCreationAttributes<Note>> {
  declare id: string;
  declare sheetId: string;
  declare number: number;
  /** A `NoteAnchor` as JSON text; written and read only through `queries/notes`. */
  declare anchor: string;
  declare class: NoteClass;
  declare text: string;
  declare writtenAt: Date;
  declare writtenBy: string;
  declare resolvedAt: CreationOptional<Date | null>;
  declare resolvedBy: CreationOptional<string | null>;
}

export function initNote(sequelize: Sequelize): void {
  Note.init(
    {
      id: idColumn(),
      sheetId: idReference(),
      number: { type: DataTypes.INTEGER, allowNull: false },
      anchor: { type: DataTypes.STRING(600), allowNull: false },
      class: { type: DataTypes.ENUM(...NOTE_CLASSES), allowNull: false },
      text: { type: DataTypes.STRING(4000), allowNull: false },
      writtenAt: { type: DataTypes.DATE(3), allowNull: false },
      writtenBy: idReference(),
      resolvedAt: { type: DataTypes.DATE(3), allowNull: true, defaultValue: null },
      resolvedBy: { ...idReference(true), defaultValue: null },
    },
    { sequelize, modelName: 'Note', tableName: 'notes' },
  );
}

import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from 'sequelize';
import { idColumn, idReference } from './columns';

export class Reply extends Model<InferAttributes<Reply>, InferCreationAttributes<Reply>> {
  declare id: string;
  declare noteId: string;
  declare text: string;
  declare writtenAt: Date;
  declare writtenBy: string;
}

export function initReply(sequelize: Sequelize): void {
  Reply.init(
    {
      id: idColumn(),
      noteId: idReference(),
      text: { type: DataTypes.STRING(4000), allowNull: false },
      writtenAt: { type: DataTypes.DATE(3), allowNull: false },
      writtenBy: idReference(),
    },
    { sequelize, modelName: 'Reply', tableName: 'replies' },
  );
}

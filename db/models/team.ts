import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from 'sequelize';
import { idColumn } from './columns';

export class Team extends Model<InferAttributes<Team>, InferCreationAttributes<Team>> {
  declare id: string;
  declare name: string;
  declare createdAt: Date;
}

export function initTeam(sequelize: Sequelize): void {
  Team.init(
    {
      id: idColumn(),
      name: { type: DataTypes.STRING(80), allowNull: false },
      createdAt: { type: DataTypes.DATE(3), allowNull: false },
    },
    { sequelize, modelName: 'Team', tableName: 'teams' },
  );
}

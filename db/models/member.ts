import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from 'sequelize';
import { ROLES, type Role } from '@/app/_shared/roles';
import { idColumn, idReference } from './columns';

/** A person in a team. A removed one stays as a row, so that a removal can be undone. */
export class Member extends Model<InferAttributes<Member>, InferCreationAttributes<Member>> {
  declare id: string;
  declare teamId: string;
  declare userId: string;
  declare role: Role;
  declare joinedAt: Date;
  declare removedAt: CreationOptional<Date | null>;
  declare removedBy: CreationOptional<string | null>;
}

export function initMember(sequelize: Sequelize): void {
  Member.init(
    {
      id: idColumn(),
      teamId: idReference(),
      userId: idReference(),
      role: { type: DataTypes.ENUM(...ROLES), allowNull: false },
      joinedAt: { type: DataTypes.DATE(3), allowNull: false },
      removedAt: { type: DataTypes.DATE(3), allowNull: true, defaultValue: null },
      removedBy: { ...idReference(true), defaultValue: null },
    },
    { sequelize, modelName: 'Member', tableName: 'members' },
  );
}

import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from 'sequelize';
import { idColumn } from './columns';

/** A person's account. The hash is left out of every reading that does not ask for it by the scope `credentials`. */
export class User extends Model<InferAttributes<User>, InferCreationAttributes<User>> {
  declare id: string;
  declare name: string;
  /** Lower case, unique. */
  declare email: string;
  declare passwordHash: string;
  /** The generation of the account's sessions: a session of another generation is revoked. */
  declare sessionVersion: CreationOptional<number>;
  declare createdAt: Date;
}

export function initUser(sequelize: Sequelize): void {
  User.init(
    {
      id: idColumn(),
      name: { type: DataTypes.STRING(80), allowNull: false },
      email: { type: DataTypes.STRING(254), allowNull: false },
      passwordHash: { type: DataTypes.STRING(255), allowNull: false },
      sessionVersion: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
      createdAt: { type: DataTypes.DATE(3), allowNull: false },
    },
    {
      sequelize,
      modelName: 'User',
      tableName: 'users',
      defaultScope: { attributes: { exclude: ['passwordHash'] } },
      scopes: { credentials: {} },
    },
  );
}

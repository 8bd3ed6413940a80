import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import { Person } from './Person.ts';

/** The one editable state of a project’s frame. */
export class Draft extends Model<InferAttributes<Draft>, InferCreationAttributes<Draft>> {
  declare projectId: string;
  declare teamId: string;
  declare version: number;
  declare fingerprint: string;
  declare updatedById: string;
  declare updatedAt: CreationOptional<Date>;
  declare updatedBy?: NonAttribute<Person>;
}

export function initDraft(sequelize: Sequelize): void {
  Draft.init(
    {
      projectId: { type: DataTypes.UUID, allowNull: false, primaryKey: true },
      teamId: { type: DataTypes.UUID, allowNull: false },
      version: { type: DataTypes.INTEGER, allowNull: false },
      fingerprint: { type: DataTypes.TEXT, allowNull: false },
      updatedById: { type: DataTypes.UUID, allowNull: false },
      updatedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'drafts', underscored: true, timestamps: false },
  );
  Draft.belongsTo(Person, { as: 'updatedBy', foreignKey: 'updatedById' });
}

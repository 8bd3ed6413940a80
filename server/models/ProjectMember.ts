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

/** Whom a project is shared with. */
export class ProjectMember extends Model<
  InferAttributes<ProjectMember>,
  InferCreationAttributes<ProjectMember>
> {
  declare projectId: string;
  declare personId: string;
  declare addedById: string;
  declare addedAt: CreationOptional<Date>;
  declare person?: NonAttribute<Person>;
}

export function initProjectMember(sequelize: Sequelize): void {
  ProjectMember.init(
    {
      projectId: { type: DataTypes.UUID, allowNull: false, primaryKey: true },
      personId: { type: DataTypes.UUID, allowNull: false, primaryKey: true },
      addedById: { type: DataTypes.UUID, allowNull: false },
      addedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'project_members', underscored: true, timestamps: false },
  );
  ProjectMember.belongsTo(Person, { as: 'person', foreignKey: 'personId' });
}

import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import { ProjectMember } from './ProjectMember.ts';

/** One machine frame. */
export class Project extends Model<InferAttributes<Project>, InferCreationAttributes<Project>> {
  declare id: string;
  declare teamId: string;
  declare name: string;
  declare machine: string;
  declare createdById: string;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare memberships?: NonAttribute<ProjectMember[]>;
}

export function initProject(sequelize: Sequelize): void {
  Project.init(
    {
      id: { type: DataTypes.UUID, allowNull: false, primaryKey: true },
      teamId: { type: DataTypes.UUID, allowNull: false },
      name: { type: DataTypes.TEXT, allowNull: false },
      machine: { type: DataTypes.TEXT, allowNull: false },
      createdById: { type: DataTypes.UUID, allowNull: false },
      createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
      updatedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'projects', underscored: true, timestamps: false },
  );
  Project.hasMany(ProjectMember, { as: 'memberships', foreignKey: 'projectId' });
}

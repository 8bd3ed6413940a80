import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
  type Transaction,
} from 'sequelize';
import { Person } from './Person.ts';
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

  /** Whom it is shared with; the memberships have to be loaded. */
  get memberIds(): NonAttribute<string[]> {
    if (this.memberships === undefined) throw new Error('The memberships are not loaded.');
    return this.memberships.map(({ personId }) => personId);
  }

  /** A project with its memberships and the people in them. */
  static load(id: string): Promise<Project | null> {
    return Project.findByPk(id, {
      include: {
        model: ProjectMember,
        as: 'memberships',
        include: [{ model: Person, as: 'person' }],
      },
    });
  }

  /**
   * The same, held against every other change to the project until the transaction ends. Whatever changes
   * anything in a project takes this lock first, so that changes come one after the other.
   */
  static async lock(transaction: Transaction, id: string): Promise<Project | null> {
    const project = await Project.findByPk(id, { transaction, lock: true });
    if (project) {
      project.memberships = await ProjectMember.findAll({
        where: { projectId: id },
        include: [{ model: Person, as: 'person' }],
        transaction,
      });
    }
    return project;
  }

  /** Moves the project to the head of the list. */
  async touch(transaction: Transaction): Promise<void> {
    await this.update({ updatedAt: new Date() }, { transaction });
  }
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

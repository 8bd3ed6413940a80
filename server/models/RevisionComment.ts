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

/** What somebody says about a revision; never changed. */
export class RevisionComment extends Model<
  InferAttributes<RevisionComment>,
  InferCreationAttributes<RevisionComment>
> {
  declare id: string;
  declare revisionId: string;
  declare authorId: string;
  declare body: string;
  declare createdAt: CreationOptional<Date>;
  declare author?: NonAttribute<Person>;
}

export function initRevisionComment(sequelize: Sequelize): void {
  RevisionComment.init(
    {
      id: { type: DataTypes.UUID, allowNull: false, primaryKey: true },
      revisionId: { type: DataTypes.UUID, allowNull: false },
      authorId: { type: DataTypes.UUID, allowNull: false },
      body: { type: DataTypes.TEXT, allowNull: false },
      createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'revision_comments', underscored: true, timestamps: false },
  );
  RevisionComment.belongsTo(Person, { as: 'author', foreignKey: 'authorId' });
}

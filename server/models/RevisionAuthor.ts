import {
  DataTypes,
  Model,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import { Person } from './Person.ts';

/** Who changed the draft before it was frozen; neither reviews nor approves. */
export class RevisionAuthor extends Model<
  InferAttributes<RevisionAuthor>,
  InferCreationAttributes<RevisionAuthor>
> {
  declare revisionId: string;
  declare personId: string;
  declare person?: NonAttribute<Person>;
}

export function initRevisionAuthor(sequelize: Sequelize): void {
  RevisionAuthor.init(
    {
      revisionId: { type: DataTypes.UUID, allowNull: false, primaryKey: true },
      personId: { type: DataTypes.UUID, allowNull: false, primaryKey: true },
    },
    { sequelize, tableName: 'revision_authors', underscored: true, timestamps: false },
  );
  RevisionAuthor.belongsTo(Person, { as: 'person', foreignKey: 'personId' });
}

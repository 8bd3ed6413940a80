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

/** A verdict on a revision; never changed. */
export class Review extends Model<InferAttributes<Review>, InferCreationAttributes<Review>> {
  declare id: string;
  declare revisionId: string;
  declare reviewerId: string;
  declare verdict: 'accept' | 'return';
  declare comment: string;
  declare createdAt: CreationOptional<Date>;
  declare reviewer?: NonAttribute<Person>;
}

export function initReview(sequelize: Sequelize): void {
  Review.init(
    {
      id: { type: DataTypes.UUID, allowNull: false, primaryKey: true },
      revisionId: { type: DataTypes.UUID, allowNull: false },
      reviewerId: { type: DataTypes.UUID, allowNull: false },
      verdict: { type: DataTypes.TEXT, allowNull: false },
      comment: { type: DataTypes.TEXT, allowNull: false },
      createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'reviews', underscored: true, timestamps: false },
  );
  Review.belongsTo(Person, { as: 'reviewer', foreignKey: 'reviewerId' });
}

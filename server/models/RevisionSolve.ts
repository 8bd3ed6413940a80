import {
  DataTypes,
  Model,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import { Solve } from './Solve.ts';

/** A solve frozen with a revision. */
export class RevisionSolve extends Model<
  InferAttributes<RevisionSolve>,
  InferCreationAttributes<RevisionSolve>
> {
  declare revisionId: string;
  declare teamId: string;
  declare solveId: string;
  declare resultKey: string;
  declare solve?: NonAttribute<Solve>;
}

export function initRevisionSolve(sequelize: Sequelize): void {
  RevisionSolve.init(
    {
      revisionId: { type: DataTypes.UUID, allowNull: false, primaryKey: true },
      teamId: { type: DataTypes.UUID, allowNull: false },
      solveId: { type: DataTypes.UUID, allowNull: false },
      resultKey: { type: DataTypes.TEXT, allowNull: false, primaryKey: true },
    },
    { sequelize, tableName: 'revision_solves', underscored: true, timestamps: false },
  );
  RevisionSolve.belongsTo(Solve, { as: 'solve', foreignKey: 'solveId' });
}

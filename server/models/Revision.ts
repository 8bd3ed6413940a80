import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import type { RevisionState } from '#shared/schemas/project.ts';
import type { SolveSettings } from '#shared/schemas/solveResult.ts';
import { Person } from './Person.ts';
import { Review } from './Review.ts';
import { RevisionAuthor } from './RevisionAuthor.ts';

/** A frozen, numbered copy of a draft; only its state and what goes with it ever changes. */
export class Revision extends Model<InferAttributes<Revision>, InferCreationAttributes<Revision>> {
  declare id: string;
  declare teamId: string;
  declare projectId: string;
  declare number: number;
  declare state: RevisionState;
  declare stateSince: CreationOptional<Date>;
  declare changeNote: string;
  declare draftVersion: number;
  declare documentFingerprint: string;
  declare settings: SolveSettings;
  declare solverVersion: string;
  declare requiredReviews: number;
  declare soleReviewerMayApprove: boolean;
  declare submittedById: string;
  declare submittedAt: CreationOptional<Date>;
  declare approvedById: CreationOptional<string | null>;
  declare approvedAt: CreationOptional<Date | null>;
  declare withdrawnById: CreationOptional<string | null>;
  declare withdrawnAt: CreationOptional<Date | null>;
  declare withdrawalReason: CreationOptional<string | null>;
  declare submittedBy?: NonAttribute<Person>;
  declare approvedBy?: NonAttribute<Person | null>;
  declare withdrawnBy?: NonAttribute<Person | null>;
  declare authorships?: NonAttribute<RevisionAuthor[]>;
  declare reviews?: NonAttribute<Review[]>;
}

export function initRevision(sequelize: Sequelize): void {
  Revision.init(
    {
      id: { type: DataTypes.UUID, allowNull: false, primaryKey: true },
      teamId: { type: DataTypes.UUID, allowNull: false },
      projectId: { type: DataTypes.UUID, allowNull: false },
      number: { type: DataTypes.INTEGER, allowNull: false },
      state: { type: DataTypes.TEXT, allowNull: false },
      stateSince: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
      changeNote: { type: DataTypes.TEXT, allowNull: false },
      draftVersion: { type: DataTypes.INTEGER, allowNull: false },
      documentFingerprint: { type: DataTypes.TEXT, allowNull: false },
      settings: { type: DataTypes.JSONB, allowNull: false },
      solverVersion: { type: DataTypes.TEXT, allowNull: false },
      requiredReviews: { type: DataTypes.INTEGER, allowNull: false },
      soleReviewerMayApprove: { type: DataTypes.BOOLEAN, allowNull: false },
      submittedById: { type: DataTypes.UUID, allowNull: false },
      submittedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
      approvedById: { type: DataTypes.UUID, allowNull: true },
      approvedAt: { type: DataTypes.DATE, allowNull: true },
      withdrawnById: { type: DataTypes.UUID, allowNull: true },
      withdrawnAt: { type: DataTypes.DATE, allowNull: true },
      withdrawalReason: { type: DataTypes.TEXT, allowNull: true },
    },
    { sequelize, tableName: 'revisions', underscored: true, timestamps: false },
  );
  Revision.belongsTo(Person, { as: 'submittedBy', foreignKey: 'submittedById' });
  Revision.belongsTo(Person, { as: 'approvedBy', foreignKey: 'approvedById' });
  Revision.belongsTo(Person, { as: 'withdrawnBy', foreignKey: 'withdrawnById' });
  Revision.hasMany(RevisionAuthor, { as: 'authorships', foreignKey: 'revisionId' });
  Revision.hasMany(Review, { as: 'reviews', foreignKey: 'revisionId' });
}

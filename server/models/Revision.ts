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
import type { RevisionState } from '#shared/schemas/project.ts';
import type { SolveSettings } from '#shared/schemas/solveResult.ts';
import { Person } from './Person.ts';
import { Project } from './Project.ts';
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
  declare project?: NonAttribute<Project>;
  declare submittedBy?: NonAttribute<Person>;
  declare approvedBy?: NonAttribute<Person | null>;
  declare withdrawnBy?: NonAttribute<Person | null>;
  declare authorships?: NonAttribute<RevisionAuthor[]>;
  declare reviews?: NonAttribute<Review[]>;

  /** Who changed the draft before it was frozen; the authorships have to be loaded. */
  get authorIds(): NonAttribute<string[]> {
    if (this.authorships === undefined) throw new Error('The authors are not loaded.');
    return this.authorships.map(({ personId }) => personId);
  }

  /** Who accepted it; the reviews have to be loaded. */
  get acceptedByIds(): NonAttribute<string[]> {
    if (this.reviews === undefined) throw new Error('The reviews are not loaded.');
    return this.reviews
      .filter(({ verdict }) => verdict === 'accept')
      .map(({ reviewerId }) => reviewerId);
  }

  /** A revision with its project, authors and reviews, and the people in them. */
  static async load(id: string): Promise<LoadedRevision | null> {
    const revision = await Revision.findByPk(id, { include: people });
    return revision && complete(revision, await Project.load(revision.projectId), null);
  }

  /** The same, held against every other change to its project until the transaction ends. */
  static async lock(transaction: Transaction, id: string): Promise<LoadedRevision | null> {
    const found = await Revision.findByPk(id, { attributes: ['projectId'], transaction });
    if (!found) return null;
    const project = await Project.lock(transaction, found.projectId);
    const revision = await Revision.findByPk(id, { transaction, lock: true, rejectOnEmpty: true });
    return complete(revision, project, transaction);
  }
}

/** A revision with what deciding about it needs. */
export type LoadedRevision = Revision & { readonly project: Project };

const people = [
  { model: Person, as: 'submittedBy' },
  { model: Person, as: 'approvedBy' },
  { model: Person, as: 'withdrawnBy' },
];

async function complete(
  revision: Revision,
  project: Project | null,
  transaction: Transaction | null,
): Promise<LoadedRevision> {
  if (project === null) throw new Error('A revision without a project.');
  const where = { revisionId: revision.id };
  const authorships = await RevisionAuthor.findAll({
    where,
    include: [{ model: Person, as: 'person' }],
    transaction,
  });
  const reviews = await Review.findAll({
    where,
    include: [{ model: Person, as: 'reviewer' }],
    order: [['createdAt', 'ASC']],
    transaction,
  });
  return Object.assign(revision, { project, authorships, reviews });
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

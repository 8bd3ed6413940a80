import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import type { WireError } from '#shared/errors/AppError.ts';
import type { SolveStatus } from '#shared/schemas/solve.ts';
import type { Method, SolveSettings } from '#shared/schemas/solveResult.ts';
import { Person } from './Person.ts';

/** A solve asked for in a project: its place in the queue, progress and outcome. */
export class Solve extends Model<InferAttributes<Solve>, InferCreationAttributes<Solve>> {
  declare id: string;
  declare teamId: string;
  declare projectId: string;
  declare revisionId: string | null;
  declare documentFingerprint: string;
  declare stateId: string | null;
  declare method: Method;
  declare settings: SolveSettings;
  declare solverVersion: string;
  /** Key under which the result is, or will be, stored. */
  declare resultKey: string;
  declare status: SolveStatus;
  /** 0…1 */
  declare progress: CreationOptional<number>;
  declare stage: CreationOptional<string>;
  declare error: CreationOptional<WireError | null>;
  declare requestedById: string;
  declare requestedAt: CreationOptional<Date>;
  declare queuedAt: CreationOptional<Date>;
  declare startedAt: CreationOptional<Date | null>;
  declare finishedAt: CreationOptional<Date | null>;
  declare elapsedMs: CreationOptional<number | null>;
  /** The runner that has it, with `attempt` the fence: only the holder of both may move it on. */
  declare runnerId: CreationOptional<string | null>;
  declare attempt: CreationOptional<number>;
  declare heartbeatAt: CreationOptional<Date | null>;
  declare requestedBy?: NonAttribute<Person>;
}

export function initSolve(sequelize: Sequelize): void {
  Solve.init(
    {
      id: { type: DataTypes.UUID, allowNull: false, primaryKey: true },
      teamId: { type: DataTypes.UUID, allowNull: false },
      projectId: { type: DataTypes.UUID, allowNull: false },
      revisionId: { type: DataTypes.UUID, allowNull: true },
      documentFingerprint: { type: DataTypes.TEXT, allowNull: false },
      stateId: { type: DataTypes.TEXT, allowNull: true },
      method: { type: DataTypes.TEXT, allowNull: false },
      settings: { type: DataTypes.JSONB, allowNull: false },
      solverVersion: { type: DataTypes.TEXT, allowNull: false },
      resultKey: { type: DataTypes.TEXT, allowNull: false },
      status: { type: DataTypes.TEXT, allowNull: false },
      progress: { type: DataTypes.DOUBLE, allowNull: false, defaultValue: 0 },
      stage: { type: DataTypes.TEXT, allowNull: false, defaultValue: '' },
      error: { type: DataTypes.JSONB, allowNull: true },
      requestedById: { type: DataTypes.UUID, allowNull: false },
      requestedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
      queuedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
      startedAt: { type: DataTypes.DATE, allowNull: true },
      finishedAt: { type: DataTypes.DATE, allowNull: true },
      elapsedMs: { type: DataTypes.DOUBLE, allowNull: true },
      runnerId: { type: DataTypes.UUID, allowNull: true },
      attempt: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
      heartbeatAt: { type: DataTypes.DATE, allowNull: true },
    },
    { sequelize, tableName: 'solves', underscored: true, timestamps: false },
  );
  Solve.belongsTo(Person, { as: 'requestedBy', foreignKey: 'requestedById' });
}

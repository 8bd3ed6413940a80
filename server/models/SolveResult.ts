import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import type { Method, SolveSettings, SolveSummary } from '#shared/schemas/solveResult.ts';

/** What a solver returned, by key; never changed. The shapes are only loaded where they are asked for. */
export class SolveResult extends Model<
  InferAttributes<SolveResult>,
  InferCreationAttributes<SolveResult>
> {
  declare teamId: string;
  declare key: string;
  declare documentFingerprint: string;
  declare stateId: string | null;
  declare method: Method;
  declare settings: SolveSettings;
  declare solverVersion: string;
  declare complete: boolean;
  /** Lowest elastic natural frequency; null when the modes returned are all rigid. */
  declare firstFrequencyHz: number | null;
  /** Canonical JSON of the summary without its timing. */
  declare summary: string;
  declare summaryFingerprint: string;
  declare timing: SolveSummary['timing'];
  declare shapes: Buffer;
  declare shapesFingerprint: string;
  declare createdAt: CreationOptional<Date>;
}

export function initSolveResult(sequelize: Sequelize): void {
  SolveResult.init(
    {
      teamId: { type: DataTypes.UUID, allowNull: false, primaryKey: true },
      key: { type: DataTypes.TEXT, allowNull: false, primaryKey: true },
      documentFingerprint: { type: DataTypes.TEXT, allowNull: false },
      stateId: { type: DataTypes.TEXT, allowNull: true },
      method: { type: DataTypes.TEXT, allowNull: false },
      settings: { type: DataTypes.JSONB, allowNull: false },
      solverVersion: { type: DataTypes.TEXT, allowNull: false },
      complete: { type: DataTypes.BOOLEAN, allowNull: false },
      firstFrequencyHz: { type: DataTypes.DOUBLE, allowNull: true },
      summary: { type: DataTypes.TEXT, allowNull: false },
      summaryFingerprint: { type: DataTypes.TEXT, allowNull: false },
      timing: { type: DataTypes.JSONB, allowNull: false },
      shapes: { type: DataTypes.BLOB, allowNull: false },
      shapesFingerprint: { type: DataTypes.TEXT, allowNull: false },
      createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'solve_results', underscored: true, timestamps: false },
  );
}

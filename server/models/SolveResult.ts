import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import { fingerprint } from '#shared/frame/fingerprint.ts';
import type { Method, SolveSettings, SolveSummary } from '#shared/schemas/solveResult.ts';

/** What a result depends on, and nothing else. */
export interface ResultSubject {
  readonly documentFingerprint: string;
  readonly stateId: string | null;
  readonly method: Method;
  readonly settings: SolveSettings;
  readonly solverVersion: string;
}

/** The key under which a team stores the result. */
export const resultKey = (subject: ResultSubject): string => {
  const { documentFingerprint, stateId, method, settings, solverVersion } = subject;
  return fingerprint({ documentFingerprint, stateId, method, settings, solverVersion });
};

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

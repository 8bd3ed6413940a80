import {
  DataTypes,
  Model,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import type { AuditAction } from './auditActions.ts';

/**
 * One link of a team's chain: hash = SHA-256(previous hash ‖ canonical text). The canonical text holds the
 * whole entry; the other columns repeat parts of it for searching, and the database checks that they agree.
 */
export class AuditEntry extends Model<
  InferAttributes<AuditEntry>,
  InferCreationAttributes<AuditEntry>
> {
  declare id: string;
  declare teamId: string;
  /** 1, 2, 3 … within the team. */
  declare sequence: number;
  declare at: Date;
  declare actorId: string | null;
  declare projectId: string | null;
  declare action: AuditAction;
  /** RFC 8785 JSON. */
  declare canonical: string;
  declare previousHash: string;
  declare hash: string;
}

export function initAuditEntry(sequelize: Sequelize): void {
  AuditEntry.init(
    {
      id: { type: DataTypes.UUID, primaryKey: true },
      teamId: { type: DataTypes.UUID, allowNull: false },
      sequence: { type: DataTypes.INTEGER, allowNull: false },
      at: { type: DataTypes.DATE, allowNull: false },
      actorId: { type: DataTypes.UUID, allowNull: true },
      projectId: { type: DataTypes.UUID, allowNull: true },
      action: { type: DataTypes.TEXT, allowNull: false },
      canonical: { type: DataTypes.TEXT, allowNull: false },
      previousHash: { type: DataTypes.TEXT, allowNull: false },
      hash: { type: DataTypes.TEXT, allowNull: false },
    },
    { sequelize, tableName: 'audit_entries', underscored: true, timestamps: false },
  );
}

import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

/** What a locked revision carries; written once, while it is approved. */
export class LockRecord extends Model<
  InferAttributes<LockRecord>,
  InferCreationAttributes<LockRecord>
> {
  declare revisionId: string;
  declare fingerprint: string;
  /** Canonical JSON (RFC 8785); the fingerprint is its SHA-256. */
  declare content: string;
  declare createdAt: CreationOptional<Date>;
}

export function initLockRecord(sequelize: Sequelize): void {
  LockRecord.init(
    {
      revisionId: { type: DataTypes.UUID, allowNull: false, primaryKey: true },
      fingerprint: { type: DataTypes.TEXT, allowNull: false },
      content: { type: DataTypes.TEXT, allowNull: false },
      createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'lock_records', underscored: true, timestamps: false },
  );
}

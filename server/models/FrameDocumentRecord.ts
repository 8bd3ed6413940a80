import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

/** A frame document by content: once per team, never changed. */
export class FrameDocumentRecord extends Model<
  InferAttributes<FrameDocumentRecord>,
  InferCreationAttributes<FrameDocumentRecord>
> {
  declare teamId: string;
  declare fingerprint: string;
  /** Canonical JSON (RFC 8785); the fingerprint is its SHA-256. */
  declare document: string;
  declare createdAt: CreationOptional<Date>;
}

export function initFrameDocumentRecord(sequelize: Sequelize): void {
  FrameDocumentRecord.init(
    {
      teamId: { type: DataTypes.UUID, allowNull: false, primaryKey: true },
      fingerprint: { type: DataTypes.TEXT, allowNull: false, primaryKey: true },
      document: { type: DataTypes.TEXT, allowNull: false },
      createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'frame_documents', underscored: true, timestamps: false },
  );
}

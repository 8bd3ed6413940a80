import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

/** A version the draft went through, and who wrote it; never changed. */
export class DraftVersion extends Model<
  InferAttributes<DraftVersion>,
  InferCreationAttributes<DraftVersion>
> {
  declare projectId: string;
  declare version: number;
  declare teamId: string;
  declare fingerprint: string;
  declare writtenById: string;
  declare writtenAt: CreationOptional<Date>;
}

export function initDraftVersion(sequelize: Sequelize): void {
  DraftVersion.init(
    {
      projectId: { type: DataTypes.UUID, allowNull: false, primaryKey: true },
      version: { type: DataTypes.INTEGER, allowNull: false, primaryKey: true },
      teamId: { type: DataTypes.UUID, allowNull: false },
      fingerprint: { type: DataTypes.TEXT, allowNull: false },
      writtenById: { type: DataTypes.UUID, allowNull: false },
      writtenAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'draft_versions', underscored: true, timestamps: false },
  );
}

import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

/** Mail that the local fake server took, for administrators to read at Team → Sent mail. */
export class SentMail extends Model<InferAttributes<SentMail>, InferCreationAttributes<SentMail>> {
  declare id: CreationOptional<string>;
  declare teamId: string;
  declare to: string;
  declare subject: string;
  declare text: string;
  declare sentAt: CreationOptional<Date>;
}

export function initSentMail(sequelize: Sequelize): void {
  SentMail.init(
    {
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      teamId: { type: DataTypes.UUID, allowNull: false },
      to: { type: DataTypes.TEXT, allowNull: false },
      subject: { type: DataTypes.TEXT, allowNull: false },
      text: { type: DataTypes.TEXT, allowNull: false },
      sentAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'sent_mail', underscored: true, timestamps: false },
  );
}

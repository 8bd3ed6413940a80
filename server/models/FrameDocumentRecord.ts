import { createHash } from 'node:crypto';
import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
  type Transaction,
} from 'sequelize';
import { canonicalJson } from '#shared/frame/canonicalJson.ts';
import { frameDocument, type FrameDocument } from '#shared/schemas/frameDocument.ts';

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

  /** Stores a document that has passed the check of its form, once; gives its fingerprint. */
  static async store(
    transaction: Transaction,
    teamId: string,
    document: FrameDocument,
  ): Promise<string> {
    const json = canonicalJson(document);
    const fingerprint = createHash('sha256').update(json).digest('hex');
    await FrameDocumentRecord.bulkCreate([{ teamId, fingerprint, document: json }], {
      transaction,
      ignoreDuplicates: true,
    });
    return fingerprint;
  }

  /** A stored document. @throws {Error} when the team has none of this fingerprint */
  static async read(
    teamId: string,
    fingerprint: string,
    transaction: Transaction | null = null,
  ): Promise<FrameDocument> {
    const record = await FrameDocumentRecord.findOne({
      where: { teamId, fingerprint },
      transaction,
      rejectOnEmpty: true,
    });
    return frameDocument.parse(JSON.parse(record.document));
  }
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

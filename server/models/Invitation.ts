import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import type { Role } from '#shared/schemas/common.ts';
import { Person } from './Person.ts';
import { Team } from './Team.ts';

export class Invitation extends Model<
  InferAttributes<Invitation>,
  InferCreationAttributes<Invitation>
> {
  declare id: CreationOptional<string>;
  declare teamId: string;
  declare email: string;
  declare role: Role;
  declare isAdministrator: boolean;
  declare invitedById: string;
  /** SHA-256 of the token in the mail, hexadecimal; null until the mail is sent. */
  declare tokenHash: CreationOptional<string | null>;
  declare expiresAt: Date;
  declare acceptedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare team?: NonAttribute<Team>;
  declare invitedBy?: NonAttribute<Person>;
}

export function initInvitation(sequelize: Sequelize): void {
  Invitation.init(
    {
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      teamId: { type: DataTypes.UUID, allowNull: false },
      email: { type: DataTypes.TEXT, allowNull: false },
      role: { type: DataTypes.TEXT, allowNull: false },
      isAdministrator: { type: DataTypes.BOOLEAN, allowNull: false },
      invitedById: { type: DataTypes.UUID, allowNull: false },
      tokenHash: { type: DataTypes.TEXT, allowNull: true },
      expiresAt: { type: DataTypes.DATE, allowNull: false },
      acceptedAt: { type: DataTypes.DATE, allowNull: true },
      createdAt: DataTypes.DATE,
      updatedAt: DataTypes.DATE,
    },
    { sequelize, tableName: 'invitations', underscored: true },
  );
  Invitation.belongsTo(Team, { as: 'team', foreignKey: 'teamId' });
  Invitation.belongsTo(Person, { as: 'invitedBy', foreignKey: 'invitedById' });
}

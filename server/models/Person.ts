import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import { ROLES, type Role } from '#shared/schemas/common.ts';
import type { Theme } from '#shared/schemas/session.ts';
import { UNIT_SYSTEMS, type UnitSystem } from '#shared/units/displayUnits.ts';
import { Team } from './Team.ts';

export class Person extends Model<InferAttributes<Person>, InferCreationAttributes<Person>> {
  declare id: CreationOptional<string>;
  declare teamId: string;
  declare name: string;
  /** Lower case; one account per address over all teams. */
  declare email: string;
  declare passwordHash: string;
  declare role: Role;
  declare isAdministrator: CreationOptional<boolean>;
  declare active: CreationOptional<boolean>;
  declare units: CreationOptional<UnitSystem>;
  declare theme: CreationOptional<Theme>;
  /** Sessions carry the epoch they began in; raising it ends them all at once, whatever else races. */
  declare sessionEpoch: CreationOptional<number>;
  declare lastSignInAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare team?: NonAttribute<Team>;
}

export function initPerson(sequelize: Sequelize): void {
  Person.init(
    {
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      teamId: { type: DataTypes.UUID, allowNull: false },
      name: { type: DataTypes.TEXT, allowNull: false },
      email: { type: DataTypes.TEXT, allowNull: false },
      passwordHash: { type: DataTypes.TEXT, allowNull: false },
      role: { type: DataTypes.TEXT, allowNull: false, validate: { isIn: [[...ROLES]] } },
      isAdministrator: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false },
      active: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: true },
      units: {
        type: DataTypes.TEXT,
        allowNull: false,
        defaultValue: 'mm-kg-N',
        validate: { isIn: [[...UNIT_SYSTEMS]] },
      },
      theme: { type: DataTypes.TEXT, allowNull: false, defaultValue: 'system' },
      sessionEpoch: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
      lastSignInAt: { type: DataTypes.DATE, allowNull: true },
      createdAt: DataTypes.DATE,
      updatedAt: DataTypes.DATE,
    },
    { sequelize, tableName: 'people', underscored: true },
  );
  Person.belongsTo(Team, { as: 'team', foreignKey: 'teamId' });
}

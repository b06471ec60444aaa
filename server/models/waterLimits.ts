import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from 'sequelize';
import type { MinuteWindow } from '@/shared/contracts/common';
import type { RuleDevice } from '@/shared/contracts/waterRules';

// When water may run: the local rules, and the permits that lift them.

export class WaterRule extends Model<InferAttributes<WaterRule>, InferCreationAttributes<WaterRule>> {
  declare id: string;
  declare yardId: string;
  declare name: string;
  declare weekdays: CreationOptional<number[] | null>;
  declare dateParity: CreationOptional<'odd' | 'even' | null>;
  declare windows: CreationOptional<MinuteWindow[] | null>;
  /** Weekdays open to each last digit of the house number, index 0 to 9. */
  declare weekdaysByDigit: CreationOptional<number[][] | null>;
  declare attended: CreationOptional<boolean>;
  /** Devices that it binds; null for all of them. */
  declare devices: CreationOptional<RuleDevice[] | null>;
  /** Stage of water shortage from which it holds; null for always. */
  declare stage: CreationOptional<number | null>;
  declare exemptSeeded: CreationOptional<boolean>;
  declare seasonFrom: CreationOptional<string | null>;
  declare seasonTo: CreationOptional<string | null>;
  declare source: string;
  declare sourceOn: string;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

function initWaterRule(sequelize: Sequelize): void {
  WaterRule.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    weekdays: { type: DataTypes.ARRAY(DataTypes.INTEGER) },
    dateParity: { type: DataTypes.TEXT },
    windows: { type: DataTypes.JSONB },
    weekdaysByDigit: { type: DataTypes.JSONB },
    attended: { type: DataTypes.BOOLEAN },
    devices: { type: DataTypes.ARRAY(DataTypes.TEXT) },
    stage: { type: DataTypes.INTEGER },
    exemptSeeded: { type: DataTypes.BOOLEAN },
    seasonFrom: { type: DataTypes.TEXT },
    seasonTo: { type: DataTypes.TEXT },
    source: { type: DataTypes.TEXT, allowNull: false },
    sourceOn: { type: DataTypes.DATEONLY, allowNull: false },
    createdAt: { type: DataTypes.DATE },
    updatedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'water_rules', underscored: true, timestamps: false });
}

export class Permit extends Model<InferAttributes<Permit>, InferCreationAttributes<Permit>> {
  declare id: string;
  declare yardId: string;
  declare name: string;
  declare zoneIds: string[];
  declare fromOn: string;
  /** Last day, included. */
  declare toOn: string;
  declare blackoutMonths: number[];
  /** Hours in which it allows water; null for the whole day. */
  declare windows: CreationOptional<MinuteWindow[] | null>;
  /** Rules that it lifts; null for all of them. */
  declare liftsRuleIds: CreationOptional<string[] | null>;
  declare source: string;
  declare sourceOn: string;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

function initPermit(sequelize: Sequelize): void {
  Permit.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    zoneIds: { type: DataTypes.ARRAY(DataTypes.UUID), allowNull: false },
    fromOn: { type: DataTypes.DATEONLY, allowNull: false },
    toOn: { type: DataTypes.DATEONLY, allowNull: false },
    blackoutMonths: { type: DataTypes.ARRAY(DataTypes.INTEGER), allowNull: false },
    windows: { type: DataTypes.JSONB },
    liftsRuleIds: { type: DataTypes.ARRAY(DataTypes.UUID) },
    source: { type: DataTypes.TEXT, allowNull: false },
    sourceOn: { type: DataTypes.DATEONLY, allowNull: false },
    createdAt: { type: DataTypes.DATE },
    updatedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'permits', underscored: true, timestamps: false });
}

/** Binds the models of this file to one database connection. */
export function initWaterLimits(sequelize: Sequelize): void {
  initWaterRule(sequelize);
  initPermit(sequelize);
}

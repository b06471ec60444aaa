import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from 'sequelize';
import type { MinuteWindow } from '@/shared/contracts/common';
import type { PlanPriorityId } from '@/shared/contracts/wishes';

// What people wish of a plan, the days that are otherwise, and the sets that somebody fixed.

export class PlanWishes extends Model<InferAttributes<PlanWishes>, InferCreationAttributes<PlanWishes>> {
  declare yardId: string;
  declare priority: PlanPriorityId;
  declare preferredWindows: MinuteWindow[];
  declare monthCapLitres: CreationOptional<number | null>;
  declare updatedAt: CreationOptional<Date>;
}

export class DayChange extends Model<InferAttributes<DayChange>, InferCreationAttributes<DayChange>> {
  declare yardId: string;
  declare on: string;
  declare dayOff: boolean;
  declare extraWindows: MinuteWindow[];
}

export class SetLock extends Model<InferAttributes<SetLock>, InferCreationAttributes<SetLock>> {
  declare id: string;
  declare yardId: string;
  declare positionId: string;
  declare on: string;
  declare startMinutes: number;
  declare minutes: number;
  declare reason: string;
  declare lockedBy: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
}

export function initWishes(sequelize: Sequelize): void {
  PlanWishes.init({
    yardId: { type: DataTypes.UUID, primaryKey: true },
    priority: { type: DataTypes.TEXT, allowNull: false },
    preferredWindows: { type: DataTypes.JSONB, allowNull: false },
    monthCapLitres: { type: DataTypes.DOUBLE },
    updatedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'plan_wishes', underscored: true, timestamps: false });
  DayChange.init({
    yardId: { type: DataTypes.UUID, primaryKey: true },
    on: { type: DataTypes.DATEONLY, primaryKey: true },
    dayOff: { type: DataTypes.BOOLEAN, allowNull: false },
    extraWindows: { type: DataTypes.JSONB, allowNull: false },
  }, { sequelize, tableName: 'day_changes', underscored: true, timestamps: false });
  SetLock.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    positionId: { type: DataTypes.UUID, allowNull: false },
    on: { type: DataTypes.DATEONLY, allowNull: false },
    startMinutes: { type: DataTypes.INTEGER, allowNull: false },
    minutes: { type: DataTypes.INTEGER, allowNull: false },
    reason: { type: DataTypes.TEXT, allowNull: false },
    lockedBy: { type: DataTypes.UUID },
    createdAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'set_locks', underscored: true, timestamps: false });
}

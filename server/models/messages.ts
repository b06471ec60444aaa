import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from 'sequelize';
import type { ReminderKind, ReminderStatus } from '@/shared/contracts/messages';

// Reminders, the daily runs that plan them, the trail of what people did, and the demonstration clock.

export class Reminder extends Model<InferAttributes<Reminder>, InferCreationAttributes<Reminder>> {
  declare id: string;
  declare yardId: string;
  declare userId: string;
  declare kind: ReminderKind;
  declare subjectKey: string;
  declare dueAt: Date;
  declare dropAfter: Date;
  declare status: ReminderStatus;
  declare claimedBy: CreationOptional<string | null>;
  declare leaseUntil: CreationOptional<Date | null>;
  declare attempts: CreationOptional<number>;
  declare messageId: string;
  declare lateMinutes: CreationOptional<number | null>;
  declare lastError: CreationOptional<string | null>;
  declare sentAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

function initReminder(sequelize: Sequelize): void {
  Reminder.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    userId: { type: DataTypes.UUID, allowNull: false },
    kind: { type: DataTypes.TEXT, allowNull: false },
    subjectKey: { type: DataTypes.TEXT, allowNull: false },
    dueAt: { type: DataTypes.DATE, allowNull: false },
    dropAfter: { type: DataTypes.DATE, allowNull: false },
    status: { type: DataTypes.TEXT, allowNull: false },
    claimedBy: { type: DataTypes.TEXT },
    leaseUntil: { type: DataTypes.DATE },
    attempts: { type: DataTypes.INTEGER },
    messageId: { type: DataTypes.TEXT, allowNull: false },
    lateMinutes: { type: DataTypes.DOUBLE },
    lastError: { type: DataTypes.TEXT },
    sentAt: { type: DataTypes.DATE },
    createdAt: { type: DataTypes.DATE },
    updatedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'reminders', underscored: true, timestamps: false });
}

export class DailyRun extends Model<InferAttributes<DailyRun>, InferCreationAttributes<DailyRun>> {
  declare yardId: string;
  declare on: string;
  declare status: 'claimed' | 'done' | 'failed';
  declare claimedBy: string;
  declare leaseUntil: Date;
  declare attempts: number;
  declare lastError: CreationOptional<string | null>;
  declare finishedAt: CreationOptional<Date | null>;
}

function initDailyRun(sequelize: Sequelize): void {
  DailyRun.init({
    yardId: { type: DataTypes.UUID, primaryKey: true },
    on: { type: DataTypes.DATEONLY, primaryKey: true },
    status: { type: DataTypes.TEXT, allowNull: false },
    claimedBy: { type: DataTypes.TEXT, allowNull: false },
    leaseUntil: { type: DataTypes.DATE, allowNull: false },
    attempts: { type: DataTypes.INTEGER, allowNull: false },
    lastError: { type: DataTypes.TEXT },
    finishedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'daily_runs', underscored: true, timestamps: false });
}

export class EventRow extends Model<InferAttributes<EventRow>, InferCreationAttributes<EventRow>> {
  declare id: string;
  declare yardId: CreationOptional<string | null>;
  declare userId: CreationOptional<string | null>;
  declare verb: string;
  declare subjectKind: string;
  declare subjectId: CreationOptional<string | null>;
  declare data: Record<string, unknown>;
  declare at: Date;
}

function initEventRow(sequelize: Sequelize): void {
  EventRow.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID },
    userId: { type: DataTypes.UUID },
    verb: { type: DataTypes.TEXT, allowNull: false },
    subjectKind: { type: DataTypes.TEXT, allowNull: false },
    subjectId: { type: DataTypes.UUID },
    data: { type: DataTypes.JSONB, allowNull: false },
    at: { type: DataTypes.DATE, allowNull: false },
  }, { sequelize, tableName: 'events', underscored: true, timestamps: false });
}

export class DemonstrationClockRow extends Model<InferAttributes<DemonstrationClockRow>, InferCreationAttributes<DemonstrationClockRow>> {
  declare onlyRow: boolean;
  declare offsetMs: number;
  declare lastSeenAt: Date;
}

function initDemonstrationClockRow(sequelize: Sequelize): void {
  DemonstrationClockRow.init({
    onlyRow: { type: DataTypes.BOOLEAN, primaryKey: true },
    offsetMs: { type: DataTypes.DOUBLE, allowNull: false },
    lastSeenAt: { type: DataTypes.DATE, allowNull: false },
  }, { sequelize, tableName: 'demonstration_clock', underscored: true, timestamps: false });
}

/** Binds the models of this file to one database connection. */
export function initMessages(sequelize: Sequelize): void {
  initReminder(sequelize);
  initDailyRun(sequelize);
  initEventRow(sequelize);
  initDemonstrationClockRow(sequelize);
}

import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from 'sequelize';
import type { EstablishmentSchedule } from '@/scheduling/establishment';
import type { PlanResult, Reason } from '@/scheduling/planning';
import type { SetKind } from '@/shared/contracts/plans';
import type { ProposalStatus } from '@/shared/contracts/proposals';
import type { RoundSetStatus, RoundStatus, SkipCause } from '@/shared/contracts/rounds';

// What to water when, how seed is tuned, and what was really done.

export class EstablishmentScheduleRow extends Model<InferAttributes<EstablishmentScheduleRow>, InferCreationAttributes<EstablishmentScheduleRow>> {
  declare id: string;
  declare yardId: string;
  declare zoneId: string;
  declare schedule: EstablishmentSchedule;
  declare isDefault: boolean;
  declare proposalId: CreationOptional<string | null>;
  declare validFrom: Date;
  declare createdAt: Date;
}

function initEstablishmentScheduleRow(sequelize: Sequelize): void {
  EstablishmentScheduleRow.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    zoneId: { type: DataTypes.UUID, allowNull: false },
    schedule: { type: DataTypes.JSONB, allowNull: false },
    isDefault: { type: DataTypes.BOOLEAN, allowNull: false },
    proposalId: { type: DataTypes.UUID },
    validFrom: { type: DataTypes.DATE, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false },
  }, { sequelize, tableName: 'establishment_schedules', underscored: true, timestamps: false });
}

export class Proposal extends Model<InferAttributes<Proposal>, InferCreationAttributes<Proposal>> {
  declare id: string;
  declare yardId: string;
  declare zoneId: string;
  declare authorId: CreationOptional<string | null>;
  declare reason: string;
  declare scheduleBefore: EstablishmentSchedule;
  declare schedule: EstablishmentSchedule;
  declare status: ProposalStatus;
  declare answer: CreationOptional<string>;
  declare decidedBy: CreationOptional<string | null>;
  declare decidedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

function initProposal(sequelize: Sequelize): void {
  Proposal.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    zoneId: { type: DataTypes.UUID, allowNull: false },
    authorId: { type: DataTypes.UUID },
    reason: { type: DataTypes.TEXT, allowNull: false },
    scheduleBefore: { type: DataTypes.JSONB, allowNull: false },
    schedule: { type: DataTypes.JSONB, allowNull: false },
    status: { type: DataTypes.TEXT, allowNull: false },
    answer: { type: DataTypes.TEXT },
    decidedBy: { type: DataTypes.UUID },
    decidedAt: { type: DataTypes.DATE },
    createdAt: { type: DataTypes.DATE },
    updatedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'proposals', underscored: true, timestamps: false });
}

export class Plan extends Model<InferAttributes<Plan>, InferCreationAttributes<Plan>> {
  declare id: string;
  declare yardId: string;
  declare version: number;
  declare fromOn: string;
  declare toOn: string;
  declare cause: string;
  declare planner: string;
  declare factsVersion: number;
  declare weatherAsOf: CreationOptional<Date | null>;
  declare result: PlanResult;
  declare createdAt: Date;
}

function initPlan(sequelize: Sequelize): void {
  Plan.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    version: { type: DataTypes.INTEGER, allowNull: false },
    fromOn: { type: DataTypes.DATEONLY, allowNull: false },
    toOn: { type: DataTypes.DATEONLY, allowNull: false },
    cause: { type: DataTypes.TEXT, allowNull: false },
    planner: { type: DataTypes.TEXT, allowNull: false },
    factsVersion: { type: DataTypes.INTEGER, allowNull: false },
    weatherAsOf: { type: DataTypes.DATE },
    result: { type: DataTypes.JSONB, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false },
  }, { sequelize, tableName: 'plans', underscored: true, timestamps: false });
}

export class PlanSet extends Model<InferAttributes<PlanSet>, InferCreationAttributes<PlanSet>> {
  declare id: string;
  declare yardId: string;
  declare planId: string;
  declare zoneId: string;
  declare positionId: string;
  declare tapId: string;
  declare kind: SetKind;
  declare on: string;
  declare roundIndex: number;
  declare sortOrder: number;
  declare startMinutes: number;
  declare minutes: number;
  declare startAt: Date;
  declare endAt: Date;
  declare depthMm: number;
  declare grossMm: number;
  declare halfWay: CreationOptional<boolean>;
  declare reasons: Reason[];
}

function initPlanSet(sequelize: Sequelize): void {
  PlanSet.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    planId: { type: DataTypes.UUID, allowNull: false },
    zoneId: { type: DataTypes.UUID, allowNull: false },
    positionId: { type: DataTypes.UUID, allowNull: false },
    tapId: { type: DataTypes.UUID, allowNull: false },
    kind: { type: DataTypes.TEXT, allowNull: false },
    on: { type: DataTypes.DATEONLY, allowNull: false },
    roundIndex: { type: DataTypes.INTEGER, allowNull: false },
    sortOrder: { type: DataTypes.INTEGER, allowNull: false },
    startMinutes: { type: DataTypes.INTEGER, allowNull: false },
    minutes: { type: DataTypes.DOUBLE, allowNull: false },
    startAt: { type: DataTypes.DATE, allowNull: false },
    endAt: { type: DataTypes.DATE, allowNull: false },
    depthMm: { type: DataTypes.DOUBLE, allowNull: false },
    grossMm: { type: DataTypes.DOUBLE, allowNull: false },
    halfWay: { type: DataTypes.BOOLEAN },
    reasons: { type: DataTypes.JSONB, allowNull: false },
  }, { sequelize, tableName: 'plan_sets', underscored: true, timestamps: false });
}

export class Round extends Model<InferAttributes<Round>, InferCreationAttributes<Round>> {
  declare id: string;
  declare yardId: string;
  declare on: string;
  declare roundIndex: number;
  declare planId: CreationOptional<string | null>;
  declare status: RoundStatus;
  declare startedBy: CreationOptional<string | null>;
  declare startedAt: Date;
  declare endedAt: CreationOptional<Date | null>;
  declare waterOffBy: CreationOptional<string | null>;
  declare waterOffAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

function initRound(sequelize: Sequelize): void {
  Round.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    on: { type: DataTypes.DATEONLY, allowNull: false },
    roundIndex: { type: DataTypes.INTEGER, allowNull: false },
    planId: { type: DataTypes.UUID },
    status: { type: DataTypes.TEXT, allowNull: false },
    startedBy: { type: DataTypes.UUID },
    startedAt: { type: DataTypes.DATE, allowNull: false },
    endedAt: { type: DataTypes.DATE },
    waterOffBy: { type: DataTypes.UUID },
    waterOffAt: { type: DataTypes.DATE },
    createdAt: { type: DataTypes.DATE },
    updatedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'rounds', underscored: true, timestamps: false });
}

export class RoundSet extends Model<InferAttributes<RoundSet>, InferCreationAttributes<RoundSet>> {
  declare id: string;
  declare yardId: string;
  declare roundId: CreationOptional<string | null>;
  declare zoneId: string;
  declare positionId: string;
  declare kind: SetKind;
  declare on: string;
  declare roundIndex: number;
  declare sortOrder: number;
  declare plannedStartAt: Date;
  declare plannedMinutes: number;
  declare addedMinutes: CreationOptional<number>;
  declare rateMmPerHour: number;
  declare runTimeMultiplier: number;
  declare zoneShare: number;
  /** Half-way between the marks of its position. */
  declare halfWay: CreationOptional<boolean>;
  declare status: RoundSetStatus;
  declare skipCause: CreationOptional<SkipCause | null>;
  declare startedAt: CreationOptional<Date | null>;
  declare endedAt: CreationOptional<Date | null>;
  declare minutesRun: CreationOptional<number | null>;
  declare appliedMm: CreationOptional<number | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

function initRoundSet(sequelize: Sequelize): void {
  RoundSet.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    roundId: { type: DataTypes.UUID },
    zoneId: { type: DataTypes.UUID, allowNull: false },
    positionId: { type: DataTypes.UUID, allowNull: false },
    kind: { type: DataTypes.TEXT, allowNull: false },
    on: { type: DataTypes.DATEONLY, allowNull: false },
    roundIndex: { type: DataTypes.INTEGER, allowNull: false },
    sortOrder: { type: DataTypes.INTEGER, allowNull: false },
    plannedStartAt: { type: DataTypes.DATE, allowNull: false },
    plannedMinutes: { type: DataTypes.DOUBLE, allowNull: false },
    addedMinutes: { type: DataTypes.DOUBLE },
    rateMmPerHour: { type: DataTypes.DOUBLE, allowNull: false },
    runTimeMultiplier: { type: DataTypes.DOUBLE, allowNull: false },
    zoneShare: { type: DataTypes.DOUBLE, allowNull: false },
    halfWay: { type: DataTypes.BOOLEAN },
    status: { type: DataTypes.TEXT, allowNull: false },
    skipCause: { type: DataTypes.TEXT },
    startedAt: { type: DataTypes.DATE },
    endedAt: { type: DataTypes.DATE },
    minutesRun: { type: DataTypes.DOUBLE },
    appliedMm: { type: DataTypes.DOUBLE },
    createdAt: { type: DataTypes.DATE },
    updatedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'round_sets', underscored: true, timestamps: false });
}

/** Binds the models of this file to one database connection. */
export function initPlans(sequelize: Sequelize): void {
  initEstablishmentScheduleRow(sequelize);
  initProposal(sequelize);
  initPlan(sequelize);
  initPlanSet(sequelize);
  initRound(sequelize);
  initRoundSet(sequelize);
}

import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from 'sequelize';
import type { CupTestResult } from '@/scheduling/sprinkler';
import type { CupLayout, CupReading, WindWord } from '@/shared/contracts/catchTests';
import type { Role, UnitSystem } from '@/shared/contracts/common';
import type { GuardedGround, SprinklerKind } from '@/shared/contracts/equipment';
import type { SupplyKind } from '@/shared/contracts/waterRules';
import type { GrassId, Mulch, SoilCompaction, SoilTexture } from '@/shared/contracts/zones';

// A yard, who belongs to it, and the facts about it.

export class Yard extends Model<InferAttributes<Yard>, InferCreationAttributes<Yard>> {
  declare id: string;
  declare name: string;
  declare placeName: string;
  declare latitudeDeg: number;
  declare longitudeDeg: number;
  declare elevationM: number;
  declare elevationIsDefault: boolean;
  declare timeZone: string;
  declare units: UnitSystem;
  declare moveMinutes: number;
  declare moveMinutesIsDefault: boolean;
  declare reminderLeadMinutes: number;
  /** Last digit of the house number, for rules that go by it. */
  declare addressDigit: CreationOptional<number | null>;
  declare waterStage: CreationOptional<number>;
  declare waterStageIsDefault: CreationOptional<boolean>;
  declare supplyKind: CreationOptional<SupplyKind | null>;
  declare supplyFlowLpm: CreationOptional<number | null>;
  declare supplyRestMinutes: CreationOptional<number | null>;
  declare supplyDrawMinutes: CreationOptional<number | null>;
  declare factsVersion: CreationOptional<number>;
  declare budgetStaleFrom: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

function initYard(sequelize: Sequelize): void {
  Yard.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    name: { type: DataTypes.TEXT, allowNull: false },
    placeName: { type: DataTypes.TEXT, allowNull: false },
    latitudeDeg: { type: DataTypes.DOUBLE, allowNull: false },
    longitudeDeg: { type: DataTypes.DOUBLE, allowNull: false },
    elevationM: { type: DataTypes.DOUBLE, allowNull: false },
    elevationIsDefault: { type: DataTypes.BOOLEAN, allowNull: false },
    timeZone: { type: DataTypes.TEXT, allowNull: false },
    units: { type: DataTypes.TEXT, allowNull: false },
    moveMinutes: { type: DataTypes.INTEGER, allowNull: false },
    moveMinutesIsDefault: { type: DataTypes.BOOLEAN, allowNull: false },
    reminderLeadMinutes: { type: DataTypes.INTEGER, allowNull: false },
    addressDigit: { type: DataTypes.INTEGER },
    waterStage: { type: DataTypes.INTEGER },
    waterStageIsDefault: { type: DataTypes.BOOLEAN },
    supplyKind: { type: DataTypes.TEXT },
    supplyFlowLpm: { type: DataTypes.DOUBLE },
    supplyRestMinutes: { type: DataTypes.INTEGER },
    supplyDrawMinutes: { type: DataTypes.INTEGER },
    factsVersion: { type: DataTypes.INTEGER },
    budgetStaleFrom: { type: DataTypes.DATEONLY },
    createdAt: { type: DataTypes.DATE },
    updatedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'yards', underscored: true, timestamps: false });
}

export class Membership extends Model<InferAttributes<Membership>, InferCreationAttributes<Membership>> {
  declare id: string;
  declare yardId: string;
  declare userId: string;
  declare role: Role;
  declare wantsMorningEmail: CreationOptional<boolean>;
  declare wantsMoveEmail: CreationOptional<boolean>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

function initMembership(sequelize: Sequelize): void {
  Membership.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    userId: { type: DataTypes.UUID, allowNull: false },
    role: { type: DataTypes.TEXT, allowNull: false },
    wantsMorningEmail: { type: DataTypes.BOOLEAN },
    wantsMoveEmail: { type: DataTypes.BOOLEAN },
    createdAt: { type: DataTypes.DATE },
    updatedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'memberships', underscored: true, timestamps: false });
}

export class Invitation extends Model<InferAttributes<Invitation>, InferCreationAttributes<Invitation>> {
  declare id: string;
  declare yardId: string;
  declare email: string;
  declare role: Role;
  declare tokenHash: string;
  declare invitedBy: CreationOptional<string | null>;
  declare createdAt: Date;
  declare expiresAt: Date;
  declare acceptedAt: CreationOptional<Date | null>;
  declare acceptedBy: CreationOptional<string | null>;
  declare withdrawnAt: CreationOptional<Date | null>;
}

function initInvitation(sequelize: Sequelize): void {
  Invitation.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    email: { type: DataTypes.TEXT, allowNull: false },
    role: { type: DataTypes.TEXT, allowNull: false },
    tokenHash: { type: DataTypes.TEXT, allowNull: false },
    invitedBy: { type: DataTypes.UUID },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    expiresAt: { type: DataTypes.DATE, allowNull: false },
    acceptedAt: { type: DataTypes.DATE },
    acceptedBy: { type: DataTypes.UUID },
    withdrawnAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'invitations', underscored: true, timestamps: false });
}

export class HomeWindow extends Model<InferAttributes<HomeWindow>, InferCreationAttributes<HomeWindow>> {
  declare id: string;
  declare yardId: string;
  declare weekday: number;
  declare fromMinutes: number;
  declare toMinutes: number;
  declare isDefault: boolean;
}

function initHomeWindow(sequelize: Sequelize): void {
  HomeWindow.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    weekday: { type: DataTypes.INTEGER, allowNull: false },
    fromMinutes: { type: DataTypes.INTEGER, allowNull: false },
    toMinutes: { type: DataTypes.INTEGER, allowNull: false },
    isDefault: { type: DataTypes.BOOLEAN, allowNull: false },
  }, { sequelize, tableName: 'home_windows', underscored: true, timestamps: false });
}

export class Tap extends Model<InferAttributes<Tap>, InferCreationAttributes<Tap>> {
  declare id: string;
  declare yardId: string;
  declare name: string;
  declare flowLpm: number;
  declare flowIsDefault: boolean;
  declare shutOffTimer: CreationOptional<boolean>;
  declare archivedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

function initTap(sequelize: Sequelize): void {
  Tap.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    flowLpm: { type: DataTypes.DOUBLE, allowNull: false },
    flowIsDefault: { type: DataTypes.BOOLEAN, allowNull: false },
    shutOffTimer: { type: DataTypes.BOOLEAN },
    archivedAt: { type: DataTypes.DATE },
    createdAt: { type: DataTypes.DATE },
    updatedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'taps', underscored: true, timestamps: false });
}

export class Hose extends Model<InferAttributes<Hose>, InferCreationAttributes<Hose>> {
  declare id: string;
  declare yardId: string;
  declare name: string;
  declare lengthM: number;
  declare boreMm: number;
  declare changedAt: CreationOptional<Date | null>;
  declare archivedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

function initHose(sequelize: Sequelize): void {
  Hose.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    lengthM: { type: DataTypes.DOUBLE, allowNull: false },
    boreMm: { type: DataTypes.DOUBLE, allowNull: false },
    changedAt: { type: DataTypes.DATE },
    archivedAt: { type: DataTypes.DATE },
    createdAt: { type: DataTypes.DATE },
    updatedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'hoses', underscored: true, timestamps: false });
}

export class Sprinkler extends Model<InferAttributes<Sprinkler>, InferCreationAttributes<Sprinkler>> {
  declare id: string;
  declare yardId: string;
  declare name: string;
  declare kind: SprinklerKind;
  declare changedAt: CreationOptional<Date | null>;
  declare archivedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

function initSprinkler(sequelize: Sequelize): void {
  Sprinkler.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    kind: { type: DataTypes.TEXT, allowNull: false },
    changedAt: { type: DataTypes.DATE },
    archivedAt: { type: DataTypes.DATE },
    createdAt: { type: DataTypes.DATE },
    updatedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'sprinklers', underscored: true, timestamps: false });
}

export class Zone extends Model<InferAttributes<Zone>, InferCreationAttributes<Zone>> {
  declare id: string;
  declare yardId: string;
  declare name: string;
  declare areaM2: number;
  declare sideAM: CreationOptional<number | null>;
  declare sideBM: CreationOptional<number | null>;
  declare grass: GrassId;
  declare grassIsDefault: boolean;
  declare soil: SoilTexture;
  declare soilIsDefault: boolean;
  declare slopePct: number;
  declare slopeIsDefault: boolean;
  declare sunHours: number;
  declare sunHoursIsDefault: boolean;
  /** Day on which the hours of sun were seen; null lets them hold on every day as they are. */
  declare sunHoursOn: CreationOptional<string | null>;
  declare sunHoursOnIsDefault: CreationOptional<boolean>;
  declare compaction: CreationOptional<SoilCompaction>;
  declare compactionIsDefault: CreationOptional<boolean>;
  declare treeRootShare: CreationOptional<number>;
  declare treeRootShareIsDefault: CreationOptional<boolean>;
  declare coverFraction: CreationOptional<number>;
  declare coverFractionIsDefault: CreationOptional<boolean>;
  /** Height of what hides the sky by degree of azimuth, from the sun diary; null without one [°]. */
  declare horizonDeg: CreationOptional<number[] | null>;
  declare seededOn: CreationOptional<string | null>;
  declare mulch: CreationOptional<Mulch>;
  declare resting: CreationOptional<boolean>;
  declare priority: CreationOptional<number>;
  declare archivedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

function initZone(sequelize: Sequelize): void {
  Zone.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    areaM2: { type: DataTypes.DOUBLE, allowNull: false },
    sideAM: { type: DataTypes.DOUBLE },
    sideBM: { type: DataTypes.DOUBLE },
    grass: { type: DataTypes.TEXT, allowNull: false },
    grassIsDefault: { type: DataTypes.BOOLEAN, allowNull: false },
    soil: { type: DataTypes.TEXT, allowNull: false },
    soilIsDefault: { type: DataTypes.BOOLEAN, allowNull: false },
    slopePct: { type: DataTypes.DOUBLE, allowNull: false },
    slopeIsDefault: { type: DataTypes.BOOLEAN, allowNull: false },
    sunHours: { type: DataTypes.DOUBLE, allowNull: false },
    sunHoursIsDefault: { type: DataTypes.BOOLEAN, allowNull: false },
    sunHoursOn: { type: DataTypes.DATEONLY },
    sunHoursOnIsDefault: { type: DataTypes.BOOLEAN },
    compaction: { type: DataTypes.TEXT },
    compactionIsDefault: { type: DataTypes.BOOLEAN },
    treeRootShare: { type: DataTypes.DOUBLE },
    treeRootShareIsDefault: { type: DataTypes.BOOLEAN },
    coverFraction: { type: DataTypes.DOUBLE },
    coverFractionIsDefault: { type: DataTypes.BOOLEAN },
    horizonDeg: { type: DataTypes.JSONB },
    seededOn: { type: DataTypes.DATEONLY },
    mulch: { type: DataTypes.TEXT },
    resting: { type: DataTypes.BOOLEAN },
    priority: { type: DataTypes.INTEGER },
    archivedAt: { type: DataTypes.DATE },
    createdAt: { type: DataTypes.DATE },
    updatedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'zones', underscored: true, timestamps: false });
}

export class Position extends Model<InferAttributes<Position>, InferCreationAttributes<Position>> {
  declare id: string;
  declare yardId: string;
  declare zoneId: string;
  declare tapId: string;
  declare hoseId: CreationOptional<string | null>;
  declare sprinklerId: string;
  declare name: string;
  declare mark: CreationOptional<string>;
  declare wettedAreaM2: number;
  declare wettedAreaIsDefault: boolean;
  /** Height above the lowest position [m]; null while nobody told it. */
  declare heightM: CreationOptional<number | null>;
  /** What lies under or beside it that takes only so much water; null for nothing. */
  declare weeklyLimitOver: CreationOptional<GuardedGround | null>;
  declare weeklyLimitMm: CreationOptional<number | null>;
  declare weeklyLimitSource: CreationOptional<string | null>;
  declare alternateSets: CreationOptional<boolean>;
  declare sortOrder: number;
  declare archivedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

function initPosition(sequelize: Sequelize): void {
  Position.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    zoneId: { type: DataTypes.UUID, allowNull: false },
    tapId: { type: DataTypes.UUID, allowNull: false },
    hoseId: { type: DataTypes.UUID },
    sprinklerId: { type: DataTypes.UUID, allowNull: false },
    name: { type: DataTypes.TEXT, allowNull: false },
    mark: { type: DataTypes.TEXT },
    wettedAreaM2: { type: DataTypes.DOUBLE, allowNull: false },
    wettedAreaIsDefault: { type: DataTypes.BOOLEAN, allowNull: false },
    heightM: { type: DataTypes.DOUBLE },
    weeklyLimitOver: { type: DataTypes.TEXT },
    weeklyLimitMm: { type: DataTypes.DOUBLE },
    weeklyLimitSource: { type: DataTypes.TEXT },
    alternateSets: { type: DataTypes.BOOLEAN },
    sortOrder: { type: DataTypes.INTEGER, allowNull: false },
    archivedAt: { type: DataTypes.DATE },
    createdAt: { type: DataTypes.DATE },
    updatedAt: { type: DataTypes.DATE },
  }, { sequelize, tableName: 'positions', underscored: true, timestamps: false });
}

export class BucketTest extends Model<InferAttributes<BucketTest>, InferCreationAttributes<BucketTest>> {
  declare id: string;
  declare yardId: string;
  declare tapId: string;
  declare hoseId: CreationOptional<string | null>;
  declare sprinklerId: CreationOptional<string | null>;
  declare volumeL: number;
  declare seconds: number;
  declare flowLpm: number;
  declare flowLowLpm: number;
  declare flowHighLpm: number;
  declare testedAt: Date;
  declare testedBy: CreationOptional<string | null>;
  declare createdAt: Date;
}

function initBucketTest(sequelize: Sequelize): void {
  BucketTest.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    tapId: { type: DataTypes.UUID, allowNull: false },
    hoseId: { type: DataTypes.UUID },
    sprinklerId: { type: DataTypes.UUID },
    volumeL: { type: DataTypes.DOUBLE, allowNull: false },
    seconds: { type: DataTypes.DOUBLE, allowNull: false },
    flowLpm: { type: DataTypes.DOUBLE, allowNull: false },
    flowLowLpm: { type: DataTypes.DOUBLE, allowNull: false },
    flowHighLpm: { type: DataTypes.DOUBLE, allowNull: false },
    testedAt: { type: DataTypes.DATE, allowNull: false },
    testedBy: { type: DataTypes.UUID },
    createdAt: { type: DataTypes.DATE, allowNull: false },
  }, { sequelize, tableName: 'bucket_tests', underscored: true, timestamps: false });
}

export class CatchTest extends Model<InferAttributes<CatchTest>, InferCreationAttributes<CatchTest>> {
  declare id: string;
  declare yardId: string;
  declare positionId: string;
  declare layout: CupLayout;
  declare reading: CupReading;
  declare readings: (number | null)[];
  declare minutes: number;
  declare wind: WindWord;
  declare note: CreationOptional<string>;
  declare rateMmPerHour: number;
  declare lowQuarterUniformity: number;
  declare runTimeMultiplier: number;
  declare result: CupTestResult;
  declare tapId: CreationOptional<string | null>;
  declare hoseId: CreationOptional<string | null>;
  declare sprinklerId: CreationOptional<string | null>;
  declare testedAt: Date;
  declare testedBy: CreationOptional<string | null>;
  declare createdAt: Date;
}

function initCatchTest(sequelize: Sequelize): void {
  CatchTest.init({
    id: { type: DataTypes.UUID, primaryKey: true },
    yardId: { type: DataTypes.UUID, allowNull: false },
    positionId: { type: DataTypes.UUID, allowNull: false },
    layout: { type: DataTypes.JSONB, allowNull: false },
    reading: { type: DataTypes.JSONB, allowNull: false },
    readings: { type: DataTypes.JSONB, allowNull: false },
    minutes: { type: DataTypes.DOUBLE, allowNull: false },
    wind: { type: DataTypes.TEXT, allowNull: false },
    note: { type: DataTypes.TEXT },
    rateMmPerHour: { type: DataTypes.DOUBLE, allowNull: false },
    lowQuarterUniformity: { type: DataTypes.DOUBLE, allowNull: false },
    runTimeMultiplier: { type: DataTypes.DOUBLE, allowNull: false },
    result: { type: DataTypes.JSONB, allowNull: false },
    tapId: { type: DataTypes.UUID },
    hoseId: { type: DataTypes.UUID },
    sprinklerId: { type: DataTypes.UUID },
    testedAt: { type: DataTypes.DATE, allowNull: false },
    testedBy: { type: DataTypes.UUID },
    createdAt: { type: DataTypes.DATE, allowNull: false },
  }, { sequelize, tableName: 'catch_tests', underscored: true, timestamps: false });
}

/** Binds the models of this file to one database connection. */
export function initYards(sequelize: Sequelize): void {
  initYard(sequelize);
  initMembership(sequelize);
  initInvitation(sequelize);
  initHomeWindow(sequelize);
  initTap(sequelize);
  initHose(sequelize);
  initSprinkler(sequelize);
  initZone(sequelize);
  initPosition(sequelize);
  initBucketTest(sequelize);
  initCatchTest(sequelize);
}

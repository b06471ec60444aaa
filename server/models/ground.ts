import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from 'sequelize';
import type { EstablishmentStage } from '@/scheduling/establishment';
import type { ScrewdriverFeel } from '@/scheduling/budget';

// What people saw on the ground of a zone, one row a day, and the climate of its place.

/** Hours of one day in which the sun fell on a zone, 0-23 of the clock of the place. */
export class SunDiaryPage extends Model<InferAttributes<SunDiaryPage>, InferCreationAttributes<SunDiaryPage>> {
  declare yardId: string;
  declare zoneId: string;
  declare on: string;
  declare sunnyHours: number[];
  declare notedBy: CreationOptional<string | null>;
  declare updatedAt: Date;
}

function initSunDiaryPage(sequelize: Sequelize): void {
  SunDiaryPage.init({
    yardId: { type: DataTypes.UUID, primaryKey: true },
    zoneId: { type: DataTypes.UUID, primaryKey: true },
    on: { type: DataTypes.DATEONLY, primaryKey: true },
    sunnyHours: { type: DataTypes.ARRAY(DataTypes.INTEGER), allowNull: false },
    notedBy: { type: DataTypes.UUID },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  }, { sequelize, tableName: 'sun_diary_pages', underscored: true, timestamps: false });
}

/** What a screwdriver or a probe told of the root zone on the morning of a day. */
export class Observation extends Model<InferAttributes<Observation>, InferCreationAttributes<Observation>> {
  declare yardId: string;
  declare zoneId: string;
  declare on: string;
  declare kind: 'screwdriver' | 'probe';
  declare feel: CreationOptional<ScrewdriverFeel | null>;
  /** [m³/m³] */
  declare waterContent: CreationOptional<number | null>;
  declare seenBy: CreationOptional<string | null>;
  declare updatedAt: Date;
}

function initObservation(sequelize: Sequelize): void {
  Observation.init({
    yardId: { type: DataTypes.UUID, primaryKey: true },
    zoneId: { type: DataTypes.UUID, primaryKey: true },
    on: { type: DataTypes.DATEONLY, primaryKey: true },
    kind: { type: DataTypes.TEXT, allowNull: false },
    feel: { type: DataTypes.TEXT },
    waterContent: { type: DataTypes.DOUBLE },
    seenBy: { type: DataTypes.UUID },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  }, { sequelize, tableName: 'observations', underscored: true, timestamps: false });
}

/** A stage of a sowing that somebody saw on a day. */
export class SeenStageRow extends Model<InferAttributes<SeenStageRow>, InferCreationAttributes<SeenStageRow>> {
  declare yardId: string;
  declare zoneId: string;
  declare on: string;
  declare stage: EstablishmentStage;
  declare seenBy: CreationOptional<string | null>;
  declare updatedAt: Date;
}

function initSeenStageRow(sequelize: Sequelize): void {
  SeenStageRow.init({
    yardId: { type: DataTypes.UUID, primaryKey: true },
    zoneId: { type: DataTypes.UUID, primaryKey: true },
    on: { type: DataTypes.DATEONLY, primaryKey: true },
    stage: { type: DataTypes.TEXT, allowNull: false },
    seenBy: { type: DataTypes.UUID },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  }, { sequelize, tableName: 'seen_stages', underscored: true, timestamps: false });
}

/** Temperatures and rain of past years at a yard, consecutive days from `fromOn`; a day that nobody recorded is null in the rows. */
export class ClimateRecord extends Model<InferAttributes<ClimateRecord>, InferCreationAttributes<ClimateRecord>> {
  declare yardId: string;
  declare fromOn: string;
  declare tminC: (number | null)[];
  declare tmaxC: (number | null)[];
  declare rainMm: (number | null)[];
  declare source: string;
  declare sample: boolean;
  declare fetchedAt: Date;
}

function initClimateRecord(sequelize: Sequelize): void {
  ClimateRecord.init({
    yardId: { type: DataTypes.UUID, primaryKey: true },
    fromOn: { type: DataTypes.DATEONLY, allowNull: false },
    tminC: { type: DataTypes.ARRAY(DataTypes.DOUBLE), allowNull: false },
    tmaxC: { type: DataTypes.ARRAY(DataTypes.DOUBLE), allowNull: false },
    rainMm: { type: DataTypes.ARRAY(DataTypes.DOUBLE), allowNull: false },
    source: { type: DataTypes.TEXT, allowNull: false },
    sample: { type: DataTypes.BOOLEAN, allowNull: false },
    fetchedAt: { type: DataTypes.DATE, allowNull: false },
  }, { sequelize, tableName: 'climate_records', underscored: true, timestamps: false });
}

/** Binds the models of this file to one database connection. */
export function initGround(sequelize: Sequelize): void {
  initSunDiaryPage(sequelize);
  initObservation(sequelize);
  initSeenStageRow(sequelize);
  initClimateRecord(sequelize);
}

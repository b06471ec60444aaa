import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type Sequelize } from 'sequelize';
import type { RainSource } from '@/shared/contracts/water';

// Weather, rain and the water budget of a yard, one row a day.

export class WeatherDay extends Model<InferAttributes<WeatherDay>, InferCreationAttributes<WeatherDay>> {
  declare yardId: string;
  declare on: string;
  declare isForecast: boolean;
  declare tminC: CreationOptional<number | null>;
  declare tmaxC: CreationOptional<number | null>;
  declare tdewC: CreationOptional<number | null>;
  declare rhMaxPct: CreationOptional<number | null>;
  declare rhMinPct: CreationOptional<number | null>;
  declare windMps: CreationOptional<number | null>;
  declare windHeightM: CreationOptional<number | null>;
  declare solarMjM2: CreationOptional<number | null>;
  declare precipitationMm: CreationOptional<number | null>;
  declare rainProbabilityPct: CreationOptional<number | null>;
  declare source: string;
  declare fetchedAt: Date;
}

function initWeatherDay(sequelize: Sequelize): void {
  WeatherDay.init({
    yardId: { type: DataTypes.UUID, primaryKey: true },
    on: { type: DataTypes.DATEONLY, primaryKey: true },
    isForecast: { type: DataTypes.BOOLEAN, allowNull: false },
    tminC: { type: DataTypes.DOUBLE },
    tmaxC: { type: DataTypes.DOUBLE },
    tdewC: { type: DataTypes.DOUBLE },
    rhMaxPct: { type: DataTypes.DOUBLE },
    rhMinPct: { type: DataTypes.DOUBLE },
    windMps: { type: DataTypes.DOUBLE },
    windHeightM: { type: DataTypes.DOUBLE },
    solarMjM2: { type: DataTypes.DOUBLE },
    precipitationMm: { type: DataTypes.DOUBLE },
    rainProbabilityPct: { type: DataTypes.DOUBLE },
    source: { type: DataTypes.TEXT, allowNull: false },
    fetchedAt: { type: DataTypes.DATE, allowNull: false },
  }, { sequelize, tableName: 'weather_days', underscored: true, timestamps: false });
}

/** When a yard's weather was last asked for and last answered. A failed question leaves the answer's fields as they were. */
export class WeatherFetch extends Model<InferAttributes<WeatherFetch>, InferCreationAttributes<WeatherFetch>> {
  declare yardId: string;
  declare askedAt: Date;
  declare answeredAt: CreationOptional<Date | null>;
  declare source: CreationOptional<string | null>;
  declare sample: CreationOptional<boolean>;
  declare lastError: CreationOptional<string | null>;
}

function initWeatherFetch(sequelize: Sequelize): void {
  WeatherFetch.init({
    yardId: { type: DataTypes.UUID, primaryKey: true },
    askedAt: { type: DataTypes.DATE, allowNull: false },
    answeredAt: { type: DataTypes.DATE },
    source: { type: DataTypes.TEXT },
    sample: { type: DataTypes.BOOLEAN },
    lastError: { type: DataTypes.TEXT },
  }, { sequelize, tableName: 'weather_fetches', underscored: true, timestamps: false });
}

export class RainEntry extends Model<InferAttributes<RainEntry>, InferCreationAttributes<RainEntry>> {
  declare yardId: string;
  declare on: string;
  declare depthMm: number;
  declare enteredBy: CreationOptional<string | null>;
  declare updatedAt: Date;
}

function initRainEntry(sequelize: Sequelize): void {
  RainEntry.init({
    yardId: { type: DataTypes.UUID, primaryKey: true },
    on: { type: DataTypes.DATEONLY, primaryKey: true },
    depthMm: { type: DataTypes.DOUBLE, allowNull: false },
    enteredBy: { type: DataTypes.UUID },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  }, { sequelize, tableName: 'rain_entries', underscored: true, timestamps: false });
}

export class BudgetDay extends Model<InferAttributes<BudgetDay>, InferCreationAttributes<BudgetDay>> {
  declare yardId: string;
  declare zoneId: string;
  declare on: string;
  declare isForecast: boolean;
  declare et0Mm: number;
  declare shadedEt0Mm: number;
  declare cropCoefficient: number;
  declare stressCoefficient: number;
  declare etcMm: number;
  declare evaporationMm: CreationOptional<number>;
  declare treeUptakeMm: CreationOptional<number>;
  declare rainMm: number;
  declare rainLossMm: number;
  declare runoffMm: CreationOptional<number>;
  declare effectiveRainMm: number;
  declare irrigationMm: number;
  declare drainageMm: number;
  declare rootGrowthMm: number;
  declare observationMm: CreationOptional<number>;
  declare depletionStartMm: number;
  declare depletionEndMm: number;
  declare totalAvailableMm: number;
  declare refillLineMm: number;
  declare rootDepthM: number;
  declare surfaceDepletionMm: CreationOptional<number | null>;
  declare rainSource: RainSource;
  declare inputs: unknown;
  declare computedAt: Date;
}

function initBudgetDay(sequelize: Sequelize): void {
  BudgetDay.init({
    yardId: { type: DataTypes.UUID, primaryKey: true },
    zoneId: { type: DataTypes.UUID, primaryKey: true },
    on: { type: DataTypes.DATEONLY, primaryKey: true },
    isForecast: { type: DataTypes.BOOLEAN, allowNull: false },
    et0Mm: { type: DataTypes.DOUBLE, allowNull: false },
    shadedEt0Mm: { type: DataTypes.DOUBLE, allowNull: false },
    cropCoefficient: { type: DataTypes.DOUBLE, allowNull: false },
    stressCoefficient: { type: DataTypes.DOUBLE, allowNull: false },
    etcMm: { type: DataTypes.DOUBLE, allowNull: false },
    evaporationMm: { type: DataTypes.DOUBLE },
    treeUptakeMm: { type: DataTypes.DOUBLE },
    rainMm: { type: DataTypes.DOUBLE, allowNull: false },
    rainLossMm: { type: DataTypes.DOUBLE, allowNull: false },
    runoffMm: { type: DataTypes.DOUBLE },
    effectiveRainMm: { type: DataTypes.DOUBLE, allowNull: false },
    irrigationMm: { type: DataTypes.DOUBLE, allowNull: false },
    drainageMm: { type: DataTypes.DOUBLE, allowNull: false },
    rootGrowthMm: { type: DataTypes.DOUBLE, allowNull: false },
    observationMm: { type: DataTypes.DOUBLE },
    depletionStartMm: { type: DataTypes.DOUBLE, allowNull: false },
    depletionEndMm: { type: DataTypes.DOUBLE, allowNull: false },
    totalAvailableMm: { type: DataTypes.DOUBLE, allowNull: false },
    refillLineMm: { type: DataTypes.DOUBLE, allowNull: false },
    rootDepthM: { type: DataTypes.DOUBLE, allowNull: false },
    surfaceDepletionMm: { type: DataTypes.DOUBLE },
    rainSource: { type: DataTypes.TEXT, allowNull: false },
    inputs: { type: DataTypes.JSONB, allowNull: false },
    computedAt: { type: DataTypes.DATE, allowNull: false },
  }, { sequelize, tableName: 'budget_days', underscored: true, timestamps: false });
}

/** Binds the models of this file to one database connection. */
export function initWater(sequelize: Sequelize): void {
  initWeatherDay(sequelize);
  initWeatherFetch(sequelize);
  initRainEntry(sequelize);
  initBudgetDay(sequelize);
}

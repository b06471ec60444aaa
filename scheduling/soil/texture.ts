import { requirePositive, requireRange } from '@/scheduling/units';

/** The nine textures of FAO-56 table 19. */
export const SOIL_TEXTURES = [
  'sand', 'loamy_sand', 'sandy_loam', 'loam', 'silt_loam', 'silt', 'silty_clay_loam', 'silty_clay', 'clay',
] as const;

export type SoilTexture = (typeof SOIL_TEXTURES)[number];

/** A published range, both ends included. */
export type Range = readonly [low: number, high: number];

/** Published ranges of one texture. */
export interface SoilTextureRanges {
  /** θFC [m³/m³] */
  fieldCapacity: Range;
  /** θWP [m³/m³] */
  wiltingPoint: Range;
  /** θFC − θWP [m³/m³] */
  available: Range;
  /** Readily evaporable water of the top 0.1 m [mm]. */
  rewMm: Range;
  /** Total evaporable water of the top 0.1 m [mm]. */
  tewMm: Range;
}

/** FAO-56 table 19. */
export const SOIL_TEXTURE_RANGES: Readonly<Record<SoilTexture, SoilTextureRanges>> = {
  sand: { fieldCapacity: [0.07, 0.17], wiltingPoint: [0.02, 0.07], available: [0.05, 0.11], rewMm: [2, 7], tewMm: [6, 12] },
  loamy_sand: { fieldCapacity: [0.11, 0.19], wiltingPoint: [0.03, 0.1], available: [0.06, 0.12], rewMm: [4, 8], tewMm: [9, 14] },
  sandy_loam: { fieldCapacity: [0.18, 0.28], wiltingPoint: [0.06, 0.16], available: [0.11, 0.15], rewMm: [6, 10], tewMm: [15, 20] },
  loam: { fieldCapacity: [0.2, 0.3], wiltingPoint: [0.07, 0.17], available: [0.13, 0.18], rewMm: [8, 10], tewMm: [16, 22] },
  silt_loam: { fieldCapacity: [0.22, 0.36], wiltingPoint: [0.09, 0.21], available: [0.13, 0.19], rewMm: [8, 11], tewMm: [18, 25] },
  silt: { fieldCapacity: [0.28, 0.36], wiltingPoint: [0.12, 0.22], available: [0.16, 0.2], rewMm: [8, 11], tewMm: [22, 26] },
  silty_clay_loam: { fieldCapacity: [0.3, 0.37], wiltingPoint: [0.17, 0.24], available: [0.13, 0.18], rewMm: [8, 11], tewMm: [22, 27] },
  silty_clay: { fieldCapacity: [0.3, 0.42], wiltingPoint: [0.17, 0.29], available: [0.13, 0.19], rewMm: [8, 12], tewMm: [22, 28] },
  clay: { fieldCapacity: [0.32, 0.4], wiltingPoint: [0.2, 0.24], available: [0.12, 0.2], rewMm: [8, 12], tewMm: [22, 29] },
};

/** How coarse a texture is, for the adjustment of the depletion fraction and of intake. */
export type SoilClass = 'coarse' | 'medium' | 'fine';

const SOIL_CLASSES: Readonly<Record<SoilTexture, SoilClass>> = {
  sand: 'coarse', loamy_sand: 'coarse', sandy_loam: 'medium', loam: 'medium', silt_loam: 'medium', silt: 'medium',
  silty_clay_loam: 'fine', silty_clay: 'fine', clay: 'fine',
};

/** Water figures of one texture, taken from the middle of the published ranges, which stay beside them. */
export interface SoilWater {
  texture: SoilTexture;
  soilClass: SoilClass;
  /** θFC, middle of its range [m³/m³] */
  fieldCapacity: number;
  /** θWP = θFC less the middle of the range of available water [m³/m³]; lies in its own published range. */
  wiltingPoint: number;
  /** Available water [mm per m of depth]. */
  availableMmPerM: number;
  rewMm: number;
  tewMm: number;
  ranges: SoilTextureRanges;
  source: string;
}

const middle = ([low, high]: Range): number => (low + high) / 2;

/** True for a known texture id. */
export function isSoilTexture(value: unknown): value is SoilTexture {
  return typeof value === 'string' && (SOIL_TEXTURES as readonly string[]).includes(value);
}

/**
 * Field capacity, wilting point and evaporable water of a texture.
 * The wilting point follows from field capacity and the range of available water, because the mid-range wilting point of silt would leave
 * less available water than the table gives; worked examples of FAO-56 (sandy loam 0.23/0.10, loamy sand 0.15/0.06) come out the same.
 * Source: FAO-56 table 19
 */
export function soilWater(texture: SoilTexture): SoilWater {
  const ranges = SOIL_TEXTURE_RANGES[texture];
  const fieldCapacity = middle(ranges.fieldCapacity);
  const available = middle(ranges.available);
  return {
    texture,
    soilClass: SOIL_CLASSES[texture],
    fieldCapacity,
    wiltingPoint: fieldCapacity - available,
    availableMmPerM: 1000 * available,
    rewMm: middle(ranges.rewMm),
    tewMm: middle(ranges.tewMm),
    ranges,
    source: 'FAO-56 table 19, middle of the range',
  };
}

/**
 * Total available water of a root zone.
 * @param fieldCapacity - θFC [m³/m³]
 * @param wiltingPoint - θWP [m³/m³], below θFC
 * @param rootDepthM - Zr [m]
 * @returns TAW [mm]
 * @throws PhysicsError for contents out of order or a depth that is not positive
 * Equation: FAO-56 (82)
 */
export function totalAvailableWaterMm(fieldCapacity: number, wiltingPoint: number, rootDepthM: number): number {
  requireRange('fieldCapacity', fieldCapacity, 0, 1);
  requireRange('wiltingPoint', wiltingPoint, 0, fieldCapacity);
  requirePositive('rootDepthM', rootDepthM);
  return 1000 * (fieldCapacity - wiltingPoint) * rootDepthM;
}

/** Total available water of a texture for a rooting depth. @returns TAW [mm]. Equation: FAO-56 (82) */
export function availableWaterMm(texture: SoilTexture, rootDepthM: number): number {
  const { fieldCapacity, wiltingPoint } = soilWater(texture);
  return totalAvailableWaterMm(fieldCapacity, wiltingPoint, rootDepthM);
}

/**
 * Total evaporable water of the surface layer.
 * @param layerM - Ze, 0.10-0.15 [m]
 * @returns TEW [mm]
 * Equation: FAO-56 (73)
 */
export function totalEvaporableWaterMm(fieldCapacity: number, wiltingPoint: number, layerM: number): number {
  return 1000 * (fieldCapacity - 0.5 * wiltingPoint) * layerM;
}

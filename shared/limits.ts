/** Limits that the forms, the contracts and the database share. One comment each says why. */
export const limits = {
  /** A name has to fit a list row on a phone. */
  nameLength: 80,
  /** RFC 5321 path limit. */
  emailLength: 254,
  /** Long enough to resist guessing; NIST SP 800-63B asks for at least 8, ASVS for 12. */
  passwordMin: 12,
  /** bcrypt reads 72 bytes; longer would be silently cut, so it is refused. */
  passwordMaxBytes: 72,
  /** A sentence or three: why a change is wanted. */
  reasonLength: 2000,
  noteLength: 500,
  /** Beyond the polar circles the daily radiation formulas and the growing season have no meaning for a lawn. */
  latitudeMaxDeg: 66,
  areaMaxM2: 20_000,
  sideMaxM: 500,
  hoseLengthMaxM: 300,
  hoseBoreMinMm: 6,
  hoseBoreMaxMm: 60,
  bucketMaxL: 500,
  bucketMaxSeconds: 3_600,
  /** A garden tap gives 4 to 65 L/min (1 to 17 gpm); 200 is beyond any. */
  flowMaxLpm: 200,
  flowMinLpm: 0.2,
  cupMouthMinMm: 20,
  /** Wider than a bucket is not a cup. */
  cupMouthMaxMm: 400,
  cupsMax: 400,
  cupDepthMaxMm: 300,
  cupVolumeMaxMl: 20_000,
  testMinutesMax: 600,
  rainDepthMaxMm: 1_000,
  /** A fact about days longer gone no longer changes what the ground holds today [days]; rain is not taken for them. */
  factDaysBack: 60,
  /** After half a year pressure, wind and the season are others: a catch-cup test is to be done again [days]. Common practice. */
  catchTestValidDays: 180,
  /** Tests kept of one tap or one position: years of them. */
  testsPerThing: 200,
  /** A day in each season and some more tell all that a diary can. */
  sunDiaryPages: 24,
  zonesPerYard: 40,
  positionsPerYard: 120,
  equipmentPerYard: 40,
  rulesPerYard: 20,
  permitsPerYard: 20,
  /** A garden on a steep hillside [m]. */
  positionHeightMaxM: 100,
  /** Far more than any lawn drinks in a week [mm]. */
  weeklyLimitMaxMm: 200,
  /** Half a day: a well that needs longer is no supply for a lawn [min]. */
  supplyRestMaxMinutes: 720,
  /** Shorter draws wet nothing [min]. */
  supplyDrawMinMinutes: 5,
  supplyDrawMaxMinutes: 720,
  windowsPerDay: 6,
  /** More than any garden draws in a month [L]. */
  monthCapMaxL: 10_000_000,
  /** A plan has ten days; every set of them fixed is more than that many only on the largest yards. */
  locksPerYard: 200,
  /** A day can be told to be otherwise this far ahead [days]. */
  dayChangesAhead: 60,
  yardsPerPerson: 500,
  membersPerYard: 30,
  dosesPerDayMax: 8,
  doseDepthMaxMm: 25,
  /** A year and a month of the budget at once is more than a chart shows. */
  budgetDaysMax: 400,
  /** A request body larger than this is refused before it is parsed. */
  requestBytes: 200_000,
} as const;

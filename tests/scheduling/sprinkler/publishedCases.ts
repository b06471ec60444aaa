/** Published cup data and results; the source stands beside each. Values were read in the sources named, not made by this code. */

/** Eisenhauer, Martin, Heeren, Hoffman 2021, Irrigation Systems Management, example 5.1, readings in inches. */
export const C01 = {
  inches: [1.2, 2.6, 1.8, 2.1, 2.2, 1.7, 2.9, 2.7, 1.6, 2.0, 2.1, 1.7, 1.9, 1.4, 2.4, 2.0, 1.6, 2.3, 1.8, 2.0],
  meanInches: 2.0, lowQuarterInches: 1.5, lowQuarterUniformity: 0.75, christiansenPct: 83.5,
};

/** Merriam and Keller 1978, Farm Irrigation System Evaluation, pp. 41-43, rates in in/h; nozzle 4.6 gpm on 30 × 50 ft. */
export const C02 = {
  inchesPerHour: [0.23, 0.31, 0.24, 0.24, 0.28, 0.31, 0.27, 0.22, 0.26, 0.31, 0.31, 0.25, 0.2, 0.22, 0.32],
  gpm: 4.6, squareFeet: 1500, appliedInchesPerHour: 0.295, christiansenPct: 87, lowQuarterPct: 82, lowQuarterCups: 4, lowHalfPct: 88, lowHalfCups: 8, pelqPct: 74,
};

/** Merriam and Keller 1978, form II-1: one lateral, cups on a 10-ft grid, rates in in/h by distance from the line in ft; moves of 50 ft. */
export const C03 = {
  offsetsFeet: [-35, -25, -15, -5, 5, 15, 25],
  rows: [
    [0.1, 0.21, 0.24, 0.28, 0.23, 0.21, 0.03],
    [0.11, 0.21, 0.26, 0.31, 0.31, 0.16, 0.01],
    [0.1, 0.16, 0.22, 0.32, 0.31, 0.15, 0.04],
    [0.1, 0.23, 0.27, 0.32, 0.27, 0.17, 0.03],
    [0.08, 0.2, 0.25, 0.3, 0.35, 0.19, 0.03],
    [0.06, 0.16, 0.19, 0.33, 0.27, 0.11, 0.04],
  ],
  moveFeet: 50,
  folded: [
    [0.23, 0.31, 0.24, 0.24, 0.28], [0.31, 0.27, 0.22, 0.26, 0.31], [0.31, 0.25, 0.2, 0.22, 0.32],
    [0.27, 0.27, 0.26, 0.27, 0.32], [0.35, 0.27, 0.23, 0.25, 0.3], [0.27, 0.17, 0.2, 0.19, 0.33],
  ],
  upper: { christiansenPct: 87, lowQuarterPct: 82, lowHalfPct: 88 },
  lower: { christiansenPct: 86, lowQuarterPct: 75, lowHalfPct: 87 },
  all: { mean: 0.264, christiansenPct: 86.46, lowQuarterPct: 78.6, lowHalfPct: 86.62 },
};

/** NC State Extension AG-553-1, solid set, 4 × 4 cups in inches after 2.25 h; statistics recomputed from the readings by hand. */
export const C04 = {
  inches: [0.57, 0.69, 0.83, 0.65, 0.61, 0.38, 0.27, 0.64, 0.51, 0.26, 0.36, 0.52, 0.79, 0.65, 0.61, 0.86],
  hours: 2.25, meanInches: 0.575, christiansenPct: 74.9, lowQuarterPct: 55.2, lowHalfPct: 75.65, inchesPerHour: 0.2556,
};

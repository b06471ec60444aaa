/**
 * Numbers the planner works with beside the weights of its cost. All are defaults; the source of each is named.
 */
export const planDefaults = {
  /** Minutes for one move of the hose. Common practice: 3 to 10 min including the walk and the re-aim. */
  moveMinutes: 5,
  /** Minutes to get ready at the start of a round. Common practice. */
  leadMinutes: 5,
  /** Above this wind only seed is watered [m/s]. Common practice: postpone above 10 to 12 mph, about 5 m/s. */
  maxWindMps: 5,
  /** A set shorter than this is not worth the walk [min]. Common practice. */
  leastSetMinutes: 10,
  /** A set of established grass that adds less than this is put off [mm]. Common practice: fewer and deeper. */
  leastSetDepthMm: 3,
  /** A dose may start this far from its time [min], and never more than half-way to its neighbour. Common practice. */
  doseShiftMinutes: 120,
  /** Water that may stand on the ground before it runs off [mm]: 0.2 in, the low end for 0 to 5 % slope (from memory). */
  surfaceStorageMm: 5,
  /** Pause for soaking between two cycles of one position [min]: starts 30 to 60 min apart in Texas A&M's cycle and soak advice. */
  soakMinutes: 30,
  /** Cycles of one position in one day at most. Common practice: three cycles on clay. */
  cyclesAtMost: 3,
  /** Rain that counts as rain when a reason says when the next is expected [mm]. Common practice. */
  notableRainMm: 2,
  /** Doses are left to rain when its chance reaches this [%] and it brings twice the doses. Common practice: a dry seedbed is the greater risk. */
  doseRainChancePct: 80,
} as const;

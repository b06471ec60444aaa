import { yardPlanner } from '@/scheduling/planning';

/** The planner whose seasons are replayed: the product's own. */
export const seasonPlanner = yardPlanner;

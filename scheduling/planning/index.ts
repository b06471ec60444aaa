export * from './checkPlan';
export * from './expectedRain';
export * from './planDefaults';
export * from './types';
export * from './yardPlanner';

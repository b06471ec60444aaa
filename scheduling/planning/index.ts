export * from './checkPlan';
export * from './expectedRain';
export * from './planDefaults';
export * from './refillLinePlanner';
export * from './types';
export * from './yardPlanner';

export * from './defaultSchedule';
export * from './dosesForDay';
export * from './establishmentSchedule';
export * from './stageOn';
export * from './thermalClock';
export * from './seedbed';

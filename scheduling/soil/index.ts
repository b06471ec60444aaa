export * from './depletion';
export * from './intake';
export * from './roots';
export * from './texture';

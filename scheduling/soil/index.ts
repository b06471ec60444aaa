export * from './depletion';
export * from './intake';
export * from './rootDepthOn';
export * from './roots';
export * from './runLimit';
export * from './texture';

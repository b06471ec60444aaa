export * from './daylight';
export * from './diffuseFraction';
export * from './radiationShare';

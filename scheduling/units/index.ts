export * from './civilDay';
export * from './conversions';
export * from './physicsError';

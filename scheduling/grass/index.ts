export * from './grass';

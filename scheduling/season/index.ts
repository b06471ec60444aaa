export * from './firstFreeze';
export * from './preventerWindow';
export * from './seasonDays';
export * from './sowingWindows';

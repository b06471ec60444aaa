export * from './firstFreeze';
export * from './preventerWindow';
export * from './seasonDays';
export * from './seasonOutlook';
export * from './sowingWindows';

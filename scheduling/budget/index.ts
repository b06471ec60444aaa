export * from './bareSoil';
export * from './dualCoefficient';
export * from './effectiveRain';
export * from './rainSoaking';
export * from './establishmentDemand';
export * from './rootZoneStore';
export * from './runBudget';
export * from './zoneDay';

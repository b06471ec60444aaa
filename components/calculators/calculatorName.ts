/** The calculators that have a page, as their addresses name them. */
export type CalculatorName = 'move-distance' | 'hose-and-bucket' | 'soil-store' | 'water-balance' | 'seedbed' | 'sun-exposure' | 'reference-et';

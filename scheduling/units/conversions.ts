/**
 * Exact unit conversions. Everything inside is SI; these are for the border with people and with published figures.
 * Definitions: international inch 25.4 mm, US gallon 231 cubic inches, statute mile 1609.344 m (NIST SP 811, appendix B), pound-force 4.4482216152605 N.
 */
const MM_PER_INCH = 25.4;
const M_PER_FOOT = 0.3048;
const M2_PER_SQUARE_FOOT = M_PER_FOOT * M_PER_FOOT;
const L_PER_US_GALLON = 3.785411784;
const MPS_PER_MPH = 0.44704;
const KPA_PER_PSI = 6.894757293168361;
const ML_PER_FLUID_OUNCE = 29.5735295625;

/** Depth or bore: millimetres [mm] to inches [in]. */
export const inchesFromMm = (mm: number): number => mm / MM_PER_INCH;
/** Depth or bore: inches [in] to millimetres [mm]. */
export const mmFromInches = (inches: number): number => inches * MM_PER_INCH;

/** Hose bore: millimetres [mm] to inches [in]. */
export const boreInchesFromMm = (boreMm: number): number => inchesFromMm(boreMm);
/** Hose bore: inches [in] to millimetres [mm]. */
export const boreMmFromInches = (boreInches: number): number => mmFromInches(boreInches);

/** Length: metres [m] to feet [ft]. */
export const feetFromM = (m: number): number => m / M_PER_FOOT;
/** Length: feet [ft] to metres [m]. */
export const mFromFeet = (feet: number): number => feet * M_PER_FOOT;

/** Area: square metres [m²] to square feet [sq ft]. */
export const squareFeetFromM2 = (m2: number): number => m2 / M2_PER_SQUARE_FOOT;
/** Area: square feet [sq ft] to square metres [m²]. */
export const m2FromSquareFeet = (squareFeet: number): number => squareFeet * M2_PER_SQUARE_FOOT;

/** Volume: litres [L] to US gallons [gal]. */
export const gallonsFromL = (l: number): number => l / L_PER_US_GALLON;
/** Volume: US gallons [gal] to litres [L]. */
export const lFromGallons = (gallons: number): number => gallons * L_PER_US_GALLON;

/** Small volume: millilitres [mL] to US fluid ounces [fl oz]. */
export const fluidOuncesFromMl = (ml: number): number => ml / ML_PER_FLUID_OUNCE;
/** Small volume: US fluid ounces [fl oz] to millilitres [mL]. */
export const mlFromFluidOunces = (fluidOunces: number): number => fluidOunces * ML_PER_FLUID_OUNCE;

/** Flow: litres per minute [L/min] to US gallons per minute [gpm]. */
export const gpmFromLpm = (lpm: number): number => lpm / L_PER_US_GALLON;
/** Flow: US gallons per minute [gpm] to litres per minute [L/min]. */
export const lpmFromGpm = (gpm: number): number => gpm * L_PER_US_GALLON;

/** Temperature: Celsius [°C] to Fahrenheit [°F]. */
export const fahrenheitFromC = (c: number): number => c * 1.8 + 32;
/** Temperature: Fahrenheit [°F] to Celsius [°C]. */
export const cFromFahrenheit = (f: number): number => (f - 32) / 1.8;

/** Rate: millimetres per hour [mm/h] to inches per hour [in/h]. */
export const inchesPerHourFromMmPerHour = (mmPerHour: number): number => mmPerHour / MM_PER_INCH;
/** Rate: inches per hour [in/h] to millimetres per hour [mm/h]. */
export const mmPerHourFromInchesPerHour = (inchesPerHour: number): number => inchesPerHour * MM_PER_INCH;

/** Speed: metres per second [m/s] to miles per hour [mph]. */
export const mphFromMps = (mps: number): number => mps / MPS_PER_MPH;
/** Speed: miles per hour [mph] to metres per second [m/s]. */
export const mpsFromMph = (mph: number): number => mph * MPS_PER_MPH;

/** Pressure: kilopascals [kPa] to pounds per square inch [psi]. */
export const psiFromKpa = (kpa: number): number => kpa / KPA_PER_PSI;
/** Pressure: pounds per square inch [psi] to kilopascals [kPa]. */
export const kpaFromPsi = (psi: number): number => psi * KPA_PER_PSI;

/** Angle: degrees [°] to radians [rad]. */
export const radFromDeg = (deg: number): number => (deg * Math.PI) / 180;
/** Angle: radians [rad] to degrees [°]. */
export const degFromRad = (rad: number): number => (rad * 180) / Math.PI;

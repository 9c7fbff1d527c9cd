// Conversion factors to SI, each with its source. Derived ones are computed from exact ones, not typed.
// [SP811]: A. Thompson, B. N. Taylor, Guide for the Use of the International System of Units (SI),
// NIST Special Publication 811, 2008, appendix B; "exact" there means exact by definition.

/** m; exact [SP811] B.8, foot. */
export const FOOT = 0.3048;
/** m; exact [SP811] B.8, inch. */
export const INCH = 0.0254;
/** kg; exact [SP811] B.8, pound avoirdupois. */
export const POUND = 0.45359237;
/** m3; US gallon, 231 cubic inches, exact [SP811] appendix B.6 and B.8. */
export const US_GALLON = 231 * INCH ** 3;
/** m/s2; exact [SP811] B.8, acceleration of free fall, standard. */
const FREE_FALL = 9.80665;
/** Pa; pound-force per square inch, from the exact pound, inch and free fall. */
export const PSI = (POUND * FREE_FALL) / INCH ** 2;
/** Pa; exact [SP811] B.8, atmosphere, standard. */
export const ATMOSPHERE = 101_325;
/** Pa; conventional millimetre of water, 1000 kg/m3 at standard free fall [SP811] B.8. */
export const MM_WATER = 1e-3 * 1000 * FREE_FALL;
/** Pa; conventional inch of water, from the millimetre; [SP811] B.8 prints 249.0889. */
export const INCH_WATER = MM_WATER * 25.4;
/** Pa; conventional millimetre of mercury, 13 595.1 kg/m3; [SP811] B.8 prints 133.3224. */
export const MM_MERCURY = 13.5951 * FREE_FALL;
/** J; international table calorie, exact [SP811] B.8. */
const CALORIE_IT = 4.1868;
/** J; thermochemical calorie, exact [SP811] B.8. */
export const CALORIE_TH = 4.184;
/** K for one degree Fahrenheit of difference; exact [SP811] B.8. */
export const RANKINE = 5 / 9;
/** J; British thermal unit (IT): 1 Btu/(lb degF) = 1 cal/(g K), exact; [SP811] prints 1055.056. */
export const BTU = CALORIE_IT * 1000 * POUND * RANKINE;
/** K; exact [SP811] B.8, degree Celsius. */
export const CELSIUS_ZERO = 273.15;
/** degF of 0 K; exact [SP811] B.8, degree Fahrenheit. */
export const FAHRENHEIT_ZERO = 459.67;

/** J/(mol K); exact since the 2019 SI [CODATA2018]. */
const GAS_CONSTANT = 8.31446261815324;

/**
 * m3/mol of ideal gas at 273.15 K and 101.325 kPa, the reference of Nm3; [CODATA2018] prints
 * 22.413 969 54e-3 m3/mol.
 */
export const NORMAL_MOLAR_VOLUME = (GAS_CONSTANT * CELSIUS_ZERO) / ATMOSPHERE;

/**
 * m3/mol of ideal gas at 60 degF and 14.696 psi, the reference of scf taken here: common practice of
 * the US gas trade, no source; other references differ by up to 3 % and are not accepted as scf.
 */
export const STANDARD_MOLAR_VOLUME = (GAS_CONSTANT * (60 + FAHRENHEIT_ZERO) * RANKINE) / (14.696 * PSI);

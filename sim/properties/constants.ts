// Constants that no other file may type again. Nothing here depends on a substance.

/** Molar gas constant, J/(mol K); exact since the 2019 SI [CODATA2018]. */
export const GAS_CONSTANT = 8.31446261815324;

/** Standard acceleration of free fall, m/s2 [CGPM1901]. Authors who used 9.81 differ by 0.03 %. */
export const STANDARD_GRAVITY = 9.80665;

/** Temperature at which compiled Henry constants are given, K. */
export const REFERENCE_TEMPERATURE = 298.15;

/** Standard atmosphere, Pa [CGPM1954]. */
export const STANDARD_ATMOSPHERE = 101_325;

/** Reference slope a0 of the recovery models. [A/s] */
export const referenceSlope = 1e8
/** Below this share of the rated current the current dependence is held: ln I has no end at zero. [1] */
export const currentFloor = 0.01
/** Reference temperature T0 (25 °C). [K] */
export const referenceTemperature = 298.15
/** Zero of the Celsius scale. [K] */
export const celsiusZero = 273.15
/** Boltzmann constant. [eV/K] (CODATA 2018) */
export const boltzmannElectronvolt = 8.617333e-5

/** Boltzmann constant, J/K; exact since the SI of 2019. */
export const boltzmannConstant = 1.380649e-23;

/** Elementary charge, C; exact since the SI of 2019. */
export const elementaryCharge = 1.602176634e-19;

/** 0 °C in K. */
export const zeroCelsius = 273.15;

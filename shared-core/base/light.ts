/** Speed of light, km/s: exact by the definition of the metre (BIPM, SI brochure, 9th edition, section 2.2). */
export const SPEED_OF_LIGHT_KM_S = 299_792.458;

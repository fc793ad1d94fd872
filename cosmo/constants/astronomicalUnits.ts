/** au, m (IAU 2012 Resolution B2; exact). */
export const astronomicalUnit = 149597870700;

/** pc = 648000/pi au, m (IAU 2015 Resolution B2; exact up to pi). */
export const parsec = (648000 / Math.PI) * astronomicalUnit;

/** Mpc, m. */
export const megaparsec = 1e6 * parsec;

/** Julian year of 365.25 days, s. */
export const julianYear = 31557600;

/** Gyr: 1e9 Julian years, s. */
export const gigayear = 1e9 * julianYear;

/** One second of arc, rad. */
export const arcsecond = Math.PI / 648000;

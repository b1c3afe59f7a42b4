/**
 * The units that are read, each by its definition in units above it. Factors are the defined, exact ones of NIST
 * SP 811 (2008), appendix B, and of the SI Brochure; nothing here is rounded.
 */
export interface UnitRow {
  symbol: string;
  /** Its definition, in units defined before it or in the base units m, g, s, rad and rev (a turn, 2π rad). */
  is: string;
  /** Takes SI prefixes. */
  prefixes?: true;
}

export const unitRows: readonly UnitRow[] = [
  { symbol: 'N', is: '1 kg m/s^2', prefixes: true },
  { symbol: 'J', is: '1 N m', prefixes: true },
  { symbol: 'W', is: '1 J/s', prefixes: true },
  { symbol: 'Pa', is: '1 N/m^2', prefixes: true },
  // Written without a space on every torque wrench.
  { symbol: 'Nm', is: '1 N m', prefixes: true },
  { symbol: 'Nmm', is: '1 N mm' },
  { symbol: 'Ncm', is: '1 N cm' },

  { symbol: 'min', is: '60 s' },
  { symbol: 'h', is: '60 min' },
  { symbol: 't', is: '1000 kg' },
  { symbol: 'bar', is: '100000 Pa', prefixes: true },
  { symbol: 'Wh', is: '1 W h', prefixes: true },

  { symbol: 'deg', is: '1/360 rev' },
  { symbol: '°', is: '1 deg' },
  { symbol: 'turn', is: '1 rev' },
  { symbol: 'rpm', is: '1 rev/min' },
  { symbol: '%', is: '1/100' },

  { symbol: 'in', is: '25.4 mm' },
  { symbol: 'inch', is: '1 in' },
  { symbol: '"', is: '1 in' },
  { symbol: 'mil', is: '1/1000 in' },
  { symbol: 'thou', is: '1 mil' },
  { symbol: 'ft', is: '12 in' },
  { symbol: "'", is: '1 ft' },
  { symbol: 'yd', is: '3 ft' },

  { symbol: 'lb', is: '0.45359237 kg' },
  { symbol: 'lbm', is: '1 lb' },
  { symbol: 'oz', is: '1/16 lb' },
  // Standard acceleration of free fall, 9.80665 m/s² (3rd CGPM, 1901), makes a weight of a mass.
  { symbol: 'lbf', is: '9.80665 lb m/s^2' },
  { symbol: 'ozf', is: '1/16 lbf' },
  { symbol: 'kip', is: '1000 lbf' },
  { symbol: 'kgf', is: '9.80665 kg m/s^2' },
  { symbol: 'kp', is: '1 kgf' },
  { symbol: 'slug', is: '1 lbf s^2/ft' },
  { symbol: 'psi', is: '1 lbf/in^2' },
  { symbol: 'ksi', is: '1000 psi' },
  { symbol: 'hp', is: '550 ft lbf/s' },
  { symbol: 'PS', is: '75 kgf m/s' },
];

/** SI prefixes as powers of ten. */
export const prefixPowers: Readonly<Record<string, number>> = {
  p: -12,
  n: -9,
  u: -6,
  µ: -6,
  m: -3,
  c: -2,
  d: -1,
  da: 1,
  h: 2,
  k: 3,
  M: 6,
  G: 9,
};

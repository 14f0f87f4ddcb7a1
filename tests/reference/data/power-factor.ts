/**
 * Power factor correction: Q_c = P(tan φ₁ − tan φ₂), C = Q_c/(ωV²) for one phase.
 */

/** Power factors after correction, of the columns of the table. */
export const CORRECTED: readonly number[] = [
  0.8, 0.81, 0.82, 0.83, 0.84, 0.85, 0.86, 0.87, 0.88, 0.89, 0.9, 0.91, 0.92, 0.93, 0.94, 0.95, 0.96,
  0.97, 0.98, 0.99, 1.0,
];

/**
 * Kilovars per kilowatt, by the power factor before: Eaton SA02607001E (Nov. 2010), table 6 [found]. A
 * third of the entries are off by one in the third decimal.
 */
export const KILOVARS: Readonly<Record<string, readonly number[]>> = {
  '0.50': [
    0.982, 1.008, 1.034, 1.06, 1.086, 1.112, 1.139, 1.165, 1.192, 1.22, 1.248, 1.276, 1.306, 1.337, 1.369,
    1.403, 1.44, 1.481, 1.529, 1.589, 1.732,
  ],
  '0.55': [
    0.769, 0.795, 0.821, 0.847, 0.873, 0.899, 0.926, 0.952, 0.979, 1.007, 1.035, 1.063, 1.093, 1.124,
    1.156, 1.19, 1.227, 1.268, 1.316, 1.376, 1.519,
  ],
  '0.60': [
    0.583, 0.609, 0.635, 0.661, 0.687, 0.713, 0.74, 0.766, 0.793, 0.821, 0.849, 0.877, 0.907, 0.938, 0.97,
    1.004, 1.041, 1.082, 1.13, 1.19, 1.333,
  ],
};

/** How far a printed entry is from the formula at most. */
export const TABLE_WITHIN = 0.0009;

export interface KilovarExample {
  readonly source: string;
  readonly kilowatts: number;
  readonly before: number;
  readonly after: number;
  readonly printed: string;
  /** Where the text multiplies with a factor of the table, half a unit of its last digit times the power. */
  readonly within?: number;
  readonly computed: string;
}

/** Worked corrections: printed [found], and computed to more digits [computed]. */
export const KILOVAR_EXAMPLES: readonly KilovarExample[] = [
  { source: 'Bird, ch. 26 ex. 6', kilowatts: 210, before: 0.7, after: 0.9, printed: '112.54', computed: '112.535' },
  { source: 'zxpress.in, factor 0.398', kilowatts: 100, before: 0.75, after: 0.9, printed: '39.8', computed: '39.759' },
  {
    source: 'elmeasure.com, factor 1.169',
    kilowatts: 650,
    before: 0.65,
    after: 1,
    printed: '759.85',
    within: 650 * 0.0005,
    computed: '759.934',
  },
  { source: 'electricalwiki.com', kilowatts: 164.6, before: 0.86, after: 0.95, printed: '44', computed: '43.567' },
];

export interface CapacitorExample {
  readonly source: string;
  readonly volts: number;
  readonly frequency: number;
  readonly watts: number;
  /** Of the load alone, var. */
  readonly reactive: number;
  /** The power factor aimed at. */
  readonly after: number;
  readonly kilovars?: string;
  readonly printed?: string;
  readonly computed: string;
}

export const CAPACITOR_EXAMPLES: readonly CapacitorExample[] = [
  {
    source: 'Bird, ch. 26 ex. 7',
    volts: 50,
    frequency: 1500,
    watts: 300,
    reactive: 400,
    after: 0.966,
    kilovars: '0.31971',
    printed: '1.357e-5',
    computed: '1.3569e-5',
  },
  {
    source: 'Hambley, ex. 5.9',
    volts: 10e3,
    frequency: 60,
    watts: 50e3,
    reactive: 50e3 * Math.tan(Math.acos(0.6)),
    after: 0.9,
    printed: '1.13e-6',
    computed: '1.126e-6',
  },
  {
    // Printed as 80.761 µF by way of a rounded reactance, which is left out.
    source: 'Kuphaldt vol. II, ch. 11, 240 V, 60 Hz, 9.615 A, 1.5 kW',
    volts: 240,
    frequency: 60,
    watts: 1500,
    reactive: Math.sqrt((240 * 9.615) ** 2 - 1500 ** 2),
    after: 1,
    computed: '8.0755e-5',
  },
];
